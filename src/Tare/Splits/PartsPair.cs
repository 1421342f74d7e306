namespace Tare;

/// <summary>Parallel features and labels cut in three.</summary>
/// <typeparam name="TRows">Container of features.</typeparam>
/// <typeparam name="TLabels">Container of labels.</typeparam>
/// <param name="TrainingX">Features to fit on, in their old order.</param>
/// <param name="TrainingY">Their labels.</param>
/// <param name="ValidationX">Features to choose on, in their old order.</param>
/// <param name="ValidationY">Their labels.</param>
/// <param name="TestX">Features to judge the winner on, once, in their old order.</param>
/// <param name="TestY">Their labels.</param>
public sealed record Parts<TRows, TLabels>(
    [property: TrainingRows] TRows TrainingX,
    [property: TrainingRows] TLabels TrainingY,
    [property: ValidationRows] TRows ValidationX,
    [property: ValidationRows] TLabels ValidationY,
    [property: TestRows] TRows TestX,
    [property: TestRows] TLabels TestY);
