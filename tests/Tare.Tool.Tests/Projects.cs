using System.Diagnostics;

namespace Tare.Tool.Tests;

/// <summary>Project files for tests, and their restore.</summary>
internal static class Projects
{
    public static string Library(string frameworks, string items = "") => $"""
        <Project Sdk="Microsoft.NET.Sdk">
          <PropertyGroup>
            <TargetFrameworks>{frameworks}</TargetFrameworks>
            <LangVersion>latest</LangVersion>
            <DefaultItemExcludes>$(DefaultItemExcludes);other/**</DefaultItemExcludes>
          </PropertyGroup>
          <ItemGroup>
            {items}
          </ItemGroup>
        </Project>
        """;

    public static Folder Restored(this Folder folder, params string[] projects)
    {
        foreach (var project in projects)
        {
            using var process = Process.Start(new ProcessStartInfo("dotnet", ["restore", folder[project], "--verbosity", "quiet"]) { RedirectStandardOutput = true })!;
            var output = process.StandardOutput.ReadToEnd();
            process.WaitForExit();
            Assert.True(process.ExitCode == 0, output);
        }

        return folder;
    }
}
