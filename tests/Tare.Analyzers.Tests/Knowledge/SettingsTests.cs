using Tare.Analyzers.Tests.Infrastructure;

namespace Tare.Analyzers.Tests.Knowledge;

/// <summary>Each key of the configuration changes what is found or said; a value that cannot be read changes nothing.</summary>
public class SettingsTests
{
    private const string Named =
        """
        static class Kiln
        {
            static int Choose(double[][] trainX, int[] trainY, double[][] testX, int[] testY)
            {
                int chosen = 0;
                double best = 0;
                foreach (int k in new[] { 1, 3, 5, 7 })
                {
                    double share = Share(Fit(trainX, trainY, k), testX, testY);
                    if (share > best)
                    {
                        best = share;
                        chosen = k;
                    }
                }

                return chosen;
            }

            static double Fit(double[][] rows, int[] labels, int k) => rows.Where((_, i) => labels[i] == 1).Average(r => r[0]) * k;

            static double Share(double cut, double[][] rows, int[] labels) => rows.Where((r, i) => (r[0] > cut ? 1 : 0) == labels[i]).Count() / (double)rows.Length;
        }
        """;

    [Fact]
    public async Task FamilyLevelAndCorrectionStandInTheMessage()
    {
        Assert.Contains("p <= 0.0125 of each", await MessageAsync(""), StringComparison.Ordinal);
        Assert.Contains("p <= 0.0025 of each", await MessageAsync("tare.family_level = 0.01"), StringComparison.Ordinal);
        Assert.Contains("p <= 0.0127 of each", await MessageAsync("tare.correction = sidak"), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("tare.family_level = 0")]
    [InlineData("tare.family_level = lots")]
    [InlineData("tare.correction = some")]
    [InlineData("tare.evidence = maybe")]
    public async Task AValueThatCannotBeReadLeavesTheDefault(string line) =>
        Assert.Contains("p <= 0.0125 of each", await MessageAsync(line), StringComparison.Ordinal);

    [Theory]
    [InlineData("tare.evidence = known")]
    [InlineData("tare.evidence = declared")]
    public async Task StrongerEvidenceThanANameCanBeAskedFor(string line) =>
        Assert.Empty(await FindAsync(Named, line));

    [Fact]
    public async Task WordsAreAdded()
    {
        string own = Named.Replace("test", "exam", StringComparison.Ordinal);
        Assert.DoesNotContain(await FindAsync(own, ""), f => f.Message.Contains("test rows 'exam", StringComparison.Ordinal));
        Assert.Contains(await FindAsync(own, "tare.test_words = exam, trial"), f => f.Rule == "TARE101");
    }

    [Fact]
    public async Task LinesAreAddedToTheCatalogue()
    {
        const string program =
            """
            static class Report
            {
                static void Announce(double[][] trainX, double[][] testX)
                {
                    double best = 0;
                    foreach (int k in new[] { 1, 3, 5 })
                        best = Math.Max(best, testX.Average(r => r[0] * k * trainX.Average(t => t[0])));
                    Environment.SetEnvironmentVariable("SHARE", best.ToString());
                }
            }
            """;
        Assert.Empty(await FindAsync(program, ""));
        var told = await Analysis.FindAsync(new TestProgram(program)
        {
            AdditionalFiles = [("tare.catalogue.txt", "M:System.Environment.SetEnvironmentVariable(*) = reports value:value")],
        });
        Assert.Contains(told, d => d.Id == "TARE102");
    }

    private static async Task<string> MessageAsync(string line) => Assert.Single(await FindAsync(Named, line)).Message;

    private static async Task<IReadOnlyList<Finding>> FindAsync(string source, string line) =>
        [.. (await Analysis.FindAsync(new TestProgram(source) { EditorConfig = line })).Select(Finding.Of)];
}
