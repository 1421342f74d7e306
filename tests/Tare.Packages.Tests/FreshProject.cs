namespace Tare.Packages.Tests;

/// <summary>A console project somewhere else, with one package reference and a program that chooses on its test rows.</summary>
internal sealed class FreshProject : IDisposable
{
    private const string Leaky =
        """
        using System;
        using System.Linq;

        var random = new Random(1);
        double[][] trainX = Draw(80), testX = Draw(40);
        bool[] trainY = Labels(80), testY = Labels(40);
        double[] cuts = { 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8 };

        double bestCut = cuts[0];
        double bestAccuracy = 0;
        foreach (double cut in cuts)
        {
            var model = Fit(trainX, trainY, cut);
            double accuracy = Accuracy(model, testX, testY);
            if (accuracy > bestAccuracy)
            {
                bestAccuracy = accuracy;
                bestCut = cut;
            }
        }

        Console.WriteLine("chosen=" + bestCut);

        double[][] Draw(int n) => Enumerable.Range(0, n).Select(_ => new[] { random.NextDouble() }).ToArray();
        bool[] Labels(int n) => Enumerable.Range(0, n).Select(_ => random.Next(2) == 1).ToArray();

        static double[] Fit(double[][] rows, bool[] labels, double cut) =>
            new[] { cut, rows.Where((r, i) => labels[i] == r[0] > cut).Count() * 2 > rows.Length ? 1.0 : -1.0 };

        static double Accuracy(double[] model, double[][] rows, bool[] labels) =>
            rows.Where((r, i) => (r[0] - model[0]) * model[1] > 0 == labels[i]).Count() / (double)rows.Length;
        """;

    private readonly string _folder = Directory.CreateTempSubdirectory("tare-fresh-").FullName;
    private readonly string _packages;

    public FreshProject(PackedFixture packed, string targets, string package)
    {
        _packages = Path.Combine(_folder, "packages");
        string project = Directory.CreateDirectory(Path.Combine(_folder, "Boards")).FullName;
        Folder = project;
        string framework = targets.Contains(';') ? "TargetFrameworks" : "TargetFramework";
        string own = Environment.GetEnvironmentVariable("NUGET_PACKAGES")
            ?? Path.Combine(Environment.GetFolderPath(Environment.SpecialFolder.UserProfile), ".nuget", "packages");
        // Sources come from the user's configuration; the folder of this run is added. What the user has unpacked is not fetched again.
        File.WriteAllText(Path.Combine(_folder, "nuget.config"), $"""
            <configuration>
              <packageSources>
                <add key="this-run" value="{packed.Feed}" />
              </packageSources>
              <fallbackPackageFolders>
                <add key="user" value="{Directory.CreateDirectory(own).FullName}" />
              </fallbackPackageFolders>
            </configuration>
            """);
        File.WriteAllText(Path.Combine(project, "Boards.csproj"), $"""
            <Project Sdk="Microsoft.NET.Sdk">
              <PropertyGroup>
                <OutputType>Exe</OutputType>
                <{framework}>{targets}</{framework}>
                <Nullable>enable</Nullable>
                <UseAppHost>false</UseAppHost>
              </PropertyGroup>
              <ItemGroup>
                <PackageReference Include="{package}" Version="{packed.Version}" />
              </ItemGroup>
            </Project>
            """);
        File.WriteAllText(ProgramFile, Leaky);
    }

    public string Folder { get; }

    public string ProgramFile => Path.Combine(Folder, "Program.cs");

    /// <summary>The line of the comparison that chooses, counted from 1.</summary>
    public static int ChoiceLine => Array.FindIndex(Leaky.Split('\n'), l => l.Contains("if (accuracy", StringComparison.Ordinal)) + 1;

    public Task<CommandResult> RunAsync(params string[] arguments) => Dotnet.RunAsync(Folder, _packages, arguments);

    /// <summary>Builds everything anew: an incremental build would not repeat its warnings.</summary>
    public Task<CommandResult> BuildAsync(params string[] arguments) =>
        RunAsync(["build", "--no-incremental", "-nologo", "-tl:off", .. arguments]);

    public string[] OutputFiles() =>
        [.. Directory.EnumerateFiles(Path.Combine(Folder, "bin"), "*", SearchOption.AllDirectories).Select(f => Path.GetFileName(f)!).Distinct().Order(StringComparer.Ordinal)];

    public void Dispose() => Directory.Delete(_folder, recursive: true);
}
