using System.Globalization;

namespace Tare.Tests;

/// <summary>One CSV file of reference values: from the folder TARE_REFERENCE when set, else the copy beside the tests.</summary>
internal static class ReferenceTable
{
    private static readonly string Folder =
        Environment.GetEnvironmentVariable("TARE_REFERENCE") is { Length: > 0 } folder
            ? folder
            : Path.Combine(AppContext.BaseDirectory, "Reference");

    public static List<ReferenceRow> Read(string file)
    {
        string[] lines = File.ReadAllLines(Path.Combine(Folder, file));
        string[] columns = lines[0].Split(',');
        List<ReferenceRow> rows = [];
        for (int i = 1; i < lines.Length; i++)
        {
            if (lines[i].Length > 0)
                rows.Add(new ReferenceRow(file, i + 1, columns, lines[i].Split(',')));
        }

        Assert.NotEmpty(rows);
        return rows;
    }

    /// <summary>The suggested relative tolerance of a file's column.</summary>
    public static double Tolerance(string file, string column) =>
        Tolerances.TryGetValue((file, column), out double tolerance)
            ? tolerance
            : throw new InvalidOperationException($"schema.csv has no tolerance for {file} {column}");

    private static readonly Dictionary<(string, string), double> Tolerances = File.ReadAllLines(Path.Combine(Folder, "schema.csv"))
        .Skip(1)
        .Select(line => line.Split(','))
        .Where(cells => double.TryParse(cells[3], NumberStyles.Float, CultureInfo.InvariantCulture, out _))
        .ToDictionary(cells => (cells[0], cells[1]), cells => double.Parse(cells[3], CultureInfo.InvariantCulture));
}
