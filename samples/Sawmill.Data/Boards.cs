namespace Sawmill;

/// <summary>Boards as they leave the kiln: eight scanner readings each, and whether the board warped within a week.</summary>
public static class Boards
{
    public const int Readings = 8;

    /// <param name="count">Boards to draw.</param>
    /// <param name="seed">The same seed draws the same boards.</param>
    /// <param name="signal">Whether the first two readings have anything to do with warping; if not, warping is a coin toss.</param>
    public static (double[][] Readings, bool[] Warped) Scan(int count, int seed, bool signal)
    {
        Random random = new(seed);
        double[][] readings = new double[count][];
        bool[] warped = new bool[count];
        for (int board = 0; board < count; board++)
        {
            double[] row = new double[Readings];
            for (int i = 0; i < Readings; i++)
                row[i] = random.NextDouble();
            double odds = signal ? Math.Exp(3 * (row[0] + row[1] - 1)) : 1;
            readings[board] = row;
            warped[board] = random.NextDouble() < odds / (1 + odds);
        }

        return (readings, warped);
    }
}
