namespace Tare;

/// <summary>Cochran's Q test: do k classifiers get the same share of the same rows right? It assumes independent rows; with two classifiers it is McNemar's chi-square test.</summary>
public static class CochranQTest
{
    /// <summary>Tests k classifiers from their outcomes.</summary>
    /// <param name="correct">One entry a row with k outcomes in it (right or wrong), k at least 2, all rows of the same length, at least one row.</param>
    /// <returns>Q and its p-value on k-1 degrees of freedom (chi-square approximation); degenerate with p = 1 when every row is all right or all wrong.</returns>
    /// <exception cref="ArgumentException">No rows, fewer than 2 classifiers, or rows of unequal length.</exception>
    /// <remarks>Source: Cochran 1950, The comparison of percentages in matched samples, Biometrika 37.</remarks>
    public static TestResult Of(IReadOnlyList<IReadOnlyList<bool>> correct)
    {
        Check.NotNull(correct, nameof(correct));
        if (correct.Count == 0)
            throw Check.Empty(nameof(correct));
        int k = Check.NotNull(correct[0], nameof(correct)).Count;
        double[] columns = new double[Math.Max(0, k)];
        double sum = 0, squares = 0;
        for (int row = 0; row < correct.Count; row++)
        {
            IReadOnlyList<bool> outcomes = Check.NotNull(correct[row], nameof(correct));
            if (outcomes.Count != k)
                throw new ArgumentException($"Row {Check.Text(row)} of 'correct' has {Check.Text(outcomes.Count)} outcomes and row 0 has {Check.Text(k)}.", nameof(correct));
            double right = 0;
            for (int j = 0; j < k; j++)
            {
                if (!outcomes[j])
                    continue;
                right++;
                columns[j]++;
            }

            sum += right;
            squares += right * right;
        }

        return FromSums(columns, sum, squares);
    }

    /// <summary>The same from sums, which can be added up over parts of the rows (or come from a grouped query) before the test is finished.</summary>
    /// <param name="hits">Rows each classifier gets right, k at least 2, none negative.</param>
    /// <param name="sumOfRowTotals">Sum over rows of how many classifiers get the row right; equals the sum of <paramref name="hits"/>.</param>
    /// <param name="sumOfSquaredRowTotals">Sum over rows of its square.</param>
    /// <returns>Q and its p-value.</returns>
    /// <exception cref="ArgumentException">Fewer than 2 classifiers, a negative or non-finite sum, or sums that do not fit together.</exception>
    public static TestResult FromSums(ReadOnlySpan<double> hits, double sumOfRowTotals, double sumOfSquaredRowTotals)
    {
        int k = hits.Length;
        if (k < 2)
            throw new ArgumentException($"There are {Check.Text(k)} classifiers; at least 2 are needed.", nameof(hits));
        double total = 0, squares = 0;
        foreach (double h in hits)
        {
            Check.AtLeast(h, 0, nameof(hits));
            total += h;
            squares += h * h;
        }

        Check.AtLeast(sumOfSquaredRowTotals, 0, nameof(sumOfSquaredRowTotals));
        if (total != sumOfRowTotals)
            throw Check.OutOfRange(nameof(sumOfRowTotals), sumOfRowTotals, $"must equal the sum of hits, {Check.Text(total)}");
        double denominator = k * sumOfRowTotals - sumOfSquaredRowTotals;
        if (denominator < 0)
            throw Check.OutOfRange(nameof(sumOfSquaredRowTotals), sumOfSquaredRowTotals, "is larger than the row totals allow");
        if (denominator == 0)
            return new TestResult("Cochran Q test", 0, 1, Side.TwoSided, Degenerate: true);
        double q = (k - 1) * (k * squares - total * total) / denominator;
        return new TestResult("Cochran Q test", q, ChiSquare.Upper(q, k - 1), Side.TwoSided);
    }
}
