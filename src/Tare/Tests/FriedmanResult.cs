namespace Tare;

/// <summary>Outcome of Friedman's test with the pairwise comparisons that follow it.</summary>
/// <param name="Blocks">Blocks (data sets) N.</param>
/// <param name="MeanRanks">Mean rank of each of k methods; 1 is best.</param>
/// <param name="ChiSquare">Tie-corrected statistic on k-1 degrees of freedom.</param>
/// <param name="PValue">Its p-value; 1 when every block ties all methods.</param>
/// <param name="F">Iman and Davenport's F on k-1 and (k-1)(N-1) degrees of freedom; infinite when every block ranks alike.</param>
/// <param name="FPValue">Its p-value, the one to prefer.</param>
/// <param name="KendallW">Agreement of the blocks, 0 to 1.</param>
/// <param name="NemenyiPValues">p-values of all pairs, adjusted for the family: entry [i, j], symmetric, 1 on the diagonal.</param>
/// <param name="Degenerate">True when every block ties all methods.</param>
public sealed record FriedmanResult(
    int Blocks, IReadOnlyList<double> MeanRanks, double ChiSquare, double PValue, double F, double FPValue, double KendallW,
    double[,] NemenyiPValues, bool Degenerate)
{
    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>Friedman test of 3 methods on 22 blocks: chi-square 11.14, p = 0.003805; F 7.122, p = 0.002171; mean ranks 2.409, 2.136, 1.455</c>.</returns>
    public override string ToString() =>
        $"Friedman test of {Plain.Count(MeanRanks.Count)} methods on {Plain.Count(Blocks)} blocks: chi-square {Plain.Number(ChiSquare)}, p = {Plain.Number(PValue)}; "
        + $"F {Plain.Number(F)}, p = {Plain.Number(FPValue)}; mean ranks {string.Join(", ", MeanRanks.Select(Plain.Number))}"
        + (Degenerate ? " (degenerate data)" : "");
}
