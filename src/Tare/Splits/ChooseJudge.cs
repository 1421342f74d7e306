namespace Tare;

/// <summary>Judging rows cut in two: the part that chooses and the part that judges.</summary>
/// <typeparam name="TRows">Container of rows: an array, a list, a data view, or row indices.</typeparam>
/// <param name="Validation">Rows to choose on, in their old order.</param>
/// <param name="Test">Rows to judge the winner on, once, in their old order.</param>
public sealed record ChooseJudge<TRows>(
    [property: ValidationRows] TRows Validation,
    [property: TestRows] TRows Test);
