namespace Tare;

/// <summary>Choosing by cross-validation errors, and what the choice's own error hides.</summary>
public static class SelectionRules
{
    /// <summary>The one-standard-error rule: the first candidate in the given order (simplest first) whose mean error is within one standard error of the best.</summary>
    /// <param name="foldErrors">For each candidate its error on each fold; at least one candidate and 2 folds, all of the same length, all finite; lower is better.</param>
    /// <returns>A candidate, from 0.</returns>
    /// <exception cref="ArgumentException">Nothing given, unequal lengths, or an error that is not finite.</exception>
    /// <remarks>Source: Breiman, Friedman, Olshen and Stone 1984, Classification and regression trees.</remarks>
    public static int OneStandardError(IReadOnlyList<IReadOnlyList<double>> foldErrors)
    {
        Moments[] candidates = Collect(foldErrors);
        int best = Best(candidates);
        double limit = candidates[best].Mean + Math.Sqrt(candidates[best].Variance / candidates[best].Count);
        int choice = 0;
        while (candidates[choice].Mean > limit)
            choice++;
        return choice;
    }

    /// <summary>How much the best candidate's cross-validation error flatters it: on each fold, its error less the smallest error there, averaged.</summary>
    /// <param name="foldErrors">As in <see cref="OneStandardError"/>.</param>
    /// <returns>The bias, at least 0; the corrected error is the best mean error plus it.</returns>
    /// <exception cref="ArgumentException">Nothing given, unequal lengths, or an error that is not finite.</exception>
    /// <remarks>Source: Tibshirani and Tibshirani 2009, A bias correction for the minimum error rate in cross-validation, Ann. Appl. Stat. 3. It over-corrects when all candidates are equally good.</remarks>
    public static double BiasOfMinimum(IReadOnlyList<IReadOnlyList<double>> foldErrors)
    {
        int best = Best(Collect(foldErrors)), folds = foldErrors[0].Count;
        double bias = 0;
        for (int fold = 0; fold < folds; fold++)
        {
            double least = double.PositiveInfinity;
            foreach (IReadOnlyList<double> candidate in foldErrors)
                least = Math.Min(least, candidate[fold]);
            bias += foldErrors[best][fold] - least;
        }

        return bias / folds;
    }

    private static int Best(Moments[] candidates)
    {
        int best = 0;
        for (int i = 1; i < candidates.Length; i++)
        {
            if (candidates[i].Mean < candidates[best].Mean)
                best = i;
        }

        return best;
    }

    private static Moments[] Collect(IReadOnlyList<IReadOnlyList<double>> foldErrors)
    {
        Check.NotNull(foldErrors, nameof(foldErrors));
        if (foldErrors.Count == 0)
            throw new ArgumentException("'foldErrors' names no candidate.", nameof(foldErrors));
        int folds = Check.NotNull(foldErrors[0], nameof(foldErrors)).Count;
        if (folds < 2)
            throw new ArgumentException($"'foldErrors' has {Check.Text(folds)} folds; at least 2 are needed.", nameof(foldErrors));
        Moments[] moments = new Moments[foldErrors.Count];
        for (int i = 0; i < moments.Length; i++)
        {
            IReadOnlyList<double> errors = Check.NotNull(foldErrors[i], nameof(foldErrors));
            if (errors.Count != folds)
                throw new ArgumentException($"Candidate {Check.Text(i)} has {Check.Text(errors.Count)} folds and candidate 0 has {Check.Text(folds)}.", nameof(foldErrors));
            for (int fold = 0; fold < folds; fold++)
            {
                Check.FiniteRow(errors[fold], fold, nameof(foldErrors));
                moments[i].Add(errors[fold]);
            }
        }

        return moments;
    }
}
