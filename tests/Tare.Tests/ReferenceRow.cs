using System.Globalization;

namespace Tare.Tests;

/// <summary>One line of a reference file.</summary>
internal sealed class ReferenceRow(string file, int line, string[] columns, string[] cells)
{
    public string Text(string column) => cells[Array.IndexOf(columns, column) is var i and >= 0 ? i : throw new InvalidOperationException($"{file} has no column {column}")];

    public double Number(string column) => double.Parse(Text(column), CultureInfo.InvariantCulture);

    /// <summary>A whole number, which some programs write as 1e+05.</summary>
    public long Count(string column)
    {
        double value = Number(column);
        return value == Math.Floor(value) ? (long)value : throw new FormatException($"{this}: {column} is no whole number");
    }

    public bool Has(string column) => Text(column) != "NA";

    public double[] Vector(string column) => [.. Text(column).Split(' ', StringSplitOptions.RemoveEmptyEntries).Select(Parse)];

    public double[][] Matrix(string column) => [.. Text(column).Split('|').Select(row => row.Split(' ', StringSplitOptions.RemoveEmptyEntries).Select(Parse).ToArray())];

    public override string ToString() => $"{file}:{line} {string.Join(", ", columns.Zip(cells, (c, v) => c + "=" + (v.Length > 60 ? v[..60] + "..." : v)))}";

    /// <summary>Relative agreement to the file's tolerance; results below the normal range are not compared digit by digit.</summary>
    public void Agrees(string column, double got, double? tolerance = null)
    {
        double want = Number(column);
        double relative = tolerance ?? ReferenceTable.Tolerance(file, column);
        Assert.True(Near(want, got, relative * Math.Abs(want) + 1e-300), $"{this}\n{column}: want {want:R}, got {got:R}, relative {Math.Abs(got - want) / Math.Abs(want):G3}");
    }

    /// <summary>Absolute agreement, for differences of near-equal numbers.</summary>
    public void AgreesAbsolutely(string column, double got, double? tolerance = null)
    {
        double want = Number(column);
        double relative = tolerance ?? ReferenceTable.Tolerance(file, column);
        Assert.True(Near(want, got, relative * Math.Max(1, Math.Abs(want))), $"{this}\n{column}: want {want:R}, got {got:R}");
    }

    private static bool Near(double want, double got, double allowed) =>
        want == got || (double.IsNaN(want) && double.IsNaN(got)) || Math.Abs(want - got) <= allowed;

    private static double Parse(string cell) => double.Parse(cell, CultureInfo.InvariantCulture);
}
