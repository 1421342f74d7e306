namespace Tare;

/// <summary>Parallel features and labels of training rows cut in two: the part that fits and the part that chooses.</summary>
/// <typeparam name="TRows">Container of features.</typeparam>
/// <typeparam name="TLabels">Container of labels.</typeparam>
/// <param name="TrainingX">Features left to fit on, in their old order.</param>
/// <param name="TrainingY">Their labels.</param>
/// <param name="ValidationX">Features held out to choose on, in their old order.</param>
/// <param name="ValidationY">Their labels.</param>
public sealed record HeldOut<TRows, TLabels>(
    [property: TrainingRows] TRows TrainingX,
    [property: TrainingRows] TLabels TrainingY,
    [property: ValidationRows] TRows ValidationX,
    [property: ValidationRows] TLabels ValidationY);
