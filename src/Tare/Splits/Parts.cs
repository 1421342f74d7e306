namespace Tare;

/// <summary>Rows cut in three.</summary>
/// <typeparam name="TRows">Container of rows: an array, a list, a data view, or row indices.</typeparam>
/// <param name="Training">Rows to fit on, in their old order.</param>
/// <param name="Validation">Rows to choose on, in their old order.</param>
/// <param name="Test">Rows to judge the winner on, once, in their old order.</param>
public sealed record Parts<TRows>(
    [property: TrainingRows] TRows Training,
    [property: ValidationRows] TRows Validation,
    [property: TestRows] TRows Test);
