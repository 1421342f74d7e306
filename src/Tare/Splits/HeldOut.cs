namespace Tare;

/// <summary>Training rows cut in two: the part that fits and the part that chooses.</summary>
/// <typeparam name="TRows">Container of rows: an array, a list, a data view, or row indices.</typeparam>
/// <param name="Training">Rows left to fit on, in their old order.</param>
/// <param name="Validation">Rows held out to choose on, in their old order.</param>
public sealed record HeldOut<TRows>(
    [property: TrainingRows] TRows Training,
    [property: ValidationRows] TRows Validation);
