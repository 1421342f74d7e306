using Microsoft.ML;

namespace Tare;

/// <summary>Claims from scored test rows in a data view, as <see cref="Claim"/> makes them from plain sequences.</summary>
/// <remarks>All forms assume independent rows. Where a model's mistakes can hurt someone, a passed test replaces neither the rules of the field nor licensed judgement.</remarks>
public static class DataViewClaim
{
    /// <summary>A claim about accuracy: exact binomial test and Clopper–Pearson interval.</summary>
    /// <param name="scored">Test rows with label and prediction; at least one row. Read once.</param>
    /// <param name="labelColumn">Column with the true label.</param>
    /// <param name="predictedLabelColumn">Column with the prediction, of the same type.</param>
    /// <param name="baseline">Accuracy to beat, 0 to 1; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="metric">Name of the proportion.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">No such column, columns of different types, no rows, or an argument outside its domain.</exception>
    public static Verdict Accuracy(
        IDataView scored, string labelColumn = "Label", string predictedLabelColumn = "PredictedLabel", double? baseline = null,
        string? baselineFrom = null, long candidates = 1, long earlierLooks = 0, double level = 0.05, string metric = "accuracy")
    {
        (DataViewSchema.Column label, DataViewSchema.Column predicted) = Columns(scored, labelColumn, nameof(labelColumn), predictedLabelColumn, nameof(predictedLabelColumn));
        if (label.Type.RawType != predicted.Type.RawType)
            throw new ArgumentException($"Columns '{label.Name}' ({label.Type}) and '{predicted.Name}' ({predicted.Type}) cannot be compared.", nameof(predictedLabelColumn));
        long hits = 0, rows = 0;
        using DataViewRowCursor cursor = scored.GetRowCursor([label, predicted]);
        Func<object> truth = ColumnReader.Reader(cursor, label, nameof(labelColumn)), guess = ColumnReader.Reader(cursor, predicted, nameof(predictedLabelColumn));
        while (cursor.MoveNext())
        {
            rows++;
            hits += truth().Equals(guess()) ? 1 : 0;
        }

        if (rows == 0)
            throw new ArgumentException("'scored' has no rows.", nameof(scored));
        return Claim.Accuracy(hits, rows, baseline, baselineFrom, candidates, earlierLooks, level, metric: metric);
    }

    /// <summary>A claim about the mean absolute error: Student's t test against a fixed baseline, t interval.</summary>
    /// <param name="scored">Test rows with label and score; at least 2 rows. Read once.</param>
    /// <param name="labelColumn">Column with the true number.</param>
    /// <param name="scoreColumn">Column with the predicted number.</param>
    /// <param name="baseline">Mean error to stay below; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="metric">Name of the error.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">No such column, a column that holds no numbers, too few rows, or an argument outside its domain.</exception>
    public static Verdict AbsoluteError(
        IDataView scored, string labelColumn = "Label", string scoreColumn = "Score", double? baseline = null,
        string? baselineFrom = null, long candidates = 1, long earlierLooks = 0, double level = 0.05, string metric = "absolute error") =>
        Claim.Loss(Errors(scored, labelColumn, scoreColumn).Select(Math.Abs), baseline, baselineFrom, candidates, earlierLooks, level, metric);

    /// <summary>A claim about the mean squared error: Student's t test against a fixed baseline, t interval.</summary>
    /// <param name="scored">Test rows with label and score; at least 2 rows. Read once.</param>
    /// <param name="labelColumn">Column with the true number.</param>
    /// <param name="scoreColumn">Column with the predicted number.</param>
    /// <param name="baseline">Mean squared error to stay below; null for an interval without pass or fail.</param>
    /// <param name="baselineFrom">Where the baseline comes from, for the reader.</param>
    /// <param name="candidates">Candidates compared on these test rows by this program, at least 1.</param>
    /// <param name="earlierLooks">Scores on these test rows seen before, at least 0.</param>
    /// <param name="level">Level of all comparisons together, strictly between 0 and 1.</param>
    /// <param name="metric">Name of the error.</param>
    /// <returns>The claim.</returns>
    /// <exception cref="ArgumentException">No such column, a column that holds no numbers, too few rows, or an argument outside its domain.</exception>
    public static Verdict SquaredError(
        IDataView scored, string labelColumn = "Label", string scoreColumn = "Score", double? baseline = null,
        string? baselineFrom = null, long candidates = 1, long earlierLooks = 0, double level = 0.05, string metric = "squared error") =>
        Claim.Loss(Errors(scored, labelColumn, scoreColumn).Select(e => e * e), baseline, baselineFrom, candidates, earlierLooks, level, metric);

    private static List<double> Errors(IDataView scored, string labelColumn, string scoreColumn)
    {
        (DataViewSchema.Column label, DataViewSchema.Column score) = Columns(scored, labelColumn, nameof(labelColumn), scoreColumn, nameof(scoreColumn));
        List<double> errors = [];
        using DataViewRowCursor cursor = scored.GetRowCursor([label, score]);
        Func<double> truth = ColumnReader.NumberReader(cursor, label, nameof(labelColumn)), guess = ColumnReader.NumberReader(cursor, score, nameof(scoreColumn));
        while (cursor.MoveNext())
            errors.Add(guess() - truth());
        return errors;
    }

    private static (DataViewSchema.Column First, DataViewSchema.Column Second) Columns(
        IDataView scored, string first, string firstName, string second, string secondName)
    {
        if (scored is null)
            throw new ArgumentNullException(nameof(scored));
        return (ColumnReader.Find(scored, first, firstName), ColumnReader.Find(scored, second, secondName));
    }
}
