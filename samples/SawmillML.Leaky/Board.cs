namespace Sawmill;

/// <summary>A board as Microsoft.ML reads it.</summary>
internal sealed class Board
{
    public float Moisture { get; set; }

    public float Density { get; set; }

    public float Knots { get; set; }

    public float Grain { get; set; }

    public float Resin { get; set; }

    public float Width { get; set; }

    public float Thickness { get; set; }

    public float Cup { get; set; }

    public bool Label { get; set; }

    public static Board[] Scan(int count, int seed, bool signal)
    {
        (double[][] readings, bool[] warped) = Boards.Scan(count, seed, signal);
        return [.. readings.Zip(warped, (r, w) => new Board
        {
            Moisture = (float)r[0],
            Density = (float)r[1],
            Knots = (float)r[2],
            Grain = (float)r[3],
            Resin = (float)r[4],
            Width = (float)r[5],
            Thickness = (float)r[6],
            Cup = (float)r[7],
            Label = w,
        })];
    }
}
