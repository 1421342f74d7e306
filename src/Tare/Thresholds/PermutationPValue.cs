namespace Tare;

/// <summary>p-value from random permutations or bootstrap samples made under no difference.</summary>
public static class PermutationPValue
{
    /// <summary>(exceedances + 1) / (permutations + 1): never 0, and valid at any number of permutations, which exceedances / permutations is not.</summary>
    /// <param name="exceedances">Random statistics at least as large as the observed one, 0 to <paramref name="permutations"/>.</param>
    /// <param name="permutations">Random permutations, at least 1; the observed order is not one of them.</param>
    /// <returns>A p-value in (0,1].</returns>
    /// <exception cref="ArgumentOutOfRangeException">A count lies outside its domain.</exception>
    /// <remarks>Source: Phipson and Smyth 2010, Permutation p-values should never be zero, Stat. Appl. Genet. Mol. Biol. 9.</remarks>
    public static double Of(long exceedances, long permutations)
    {
        Check.HitsOf(exceedances, permutations, nameof(exceedances), nameof(permutations));
        return (exceedances + 1.0) / (permutations + 1.0);
    }
}
