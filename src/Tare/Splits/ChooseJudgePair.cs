namespace Tare;

/// <summary>Parallel features and labels of judging rows cut in two: the part that chooses and the part that judges.</summary>
/// <typeparam name="TRows">Container of features.</typeparam>
/// <typeparam name="TLabels">Container of labels.</typeparam>
/// <param name="ValidationX">Features to choose on, in their old order.</param>
/// <param name="ValidationY">Their labels.</param>
/// <param name="TestX">Features to judge the winner on, once, in their old order.</param>
/// <param name="TestY">Their labels.</param>
public sealed record ChooseJudge<TRows, TLabels>(
    [property: ValidationRows] TRows ValidationX,
    [property: ValidationRows] TLabels ValidationY,
    [property: TestRows] TRows TestX,
    [property: TestRows] TLabels TestY);
