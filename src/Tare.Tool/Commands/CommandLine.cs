using System.CommandLine;
using System.CommandLine.Help;
using System.Reflection;
using Tare.Tool.Analysis;

namespace Tare.Tool.Commands;

/// <summary>The commands and their options.</summary>
internal static class CommandLine
{
    private const string InspectExamples = """
        Examples:
          tare inspect .                          the solution or the projects in this folder
          tare inspect src/Training.csproj        one project
          tare inspect Experiment.cs              one file
          tare inspect . --fail-on info           exit code 1 for suggestions too
          tare inspect . --sarif findings.sarif   for code scanning and editors

        Exit codes: 0 nothing at or above --fail-on, 1 something found, 2 bad call or code that does not load.
        """;

    private const string MendExamples = """
        Examples:
          tare mend .                             show what would change, as a unified diff
          tare mend . > mend.diff                 keep it, to review it or to apply it with `git apply`
          tare mend . --write                     change the files
          tare mend . --rule TARE101 --write      one rule only

        Exit codes: 0 everything was mended, 1 findings at or above --fail-on are left, 2 bad call or code that does not load.
        """;

    private const string RootExamples = """
        Examples:
          tare inspect .
          tare mend src/Training.csproj

        `tare inspect --help` and `tare mend --help` show more.
        """;

    /// <summary>The version without the commit that a build appends.</summary>
    public static string Version { get; } =
        typeof(CommandLine).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()!.InformationalVersion.Split('+')[0];

    public static RootCommand Build(RulePack rules, Surroundings surroundings)
    {
        var root = new RootCommand("Finds code that picks a model with the rows that were meant to judge it, and mends it.")
        {
            HelpName = "tare",
        };
        root.Add(Inspect(rules, surroundings));
        root.Add(Mend(rules, surroundings));
        foreach (var option in root.Options)
        {
            if (option is VersionOption version)
            {
                // The default prints the version of whatever process hosts this assembly.
                version.Action = new WriteAction(output => output.WriteLine(Version));
            }

            if (option is HelpOption help)
            {
                help.Action = new HelpWithExamples((HelpAction)help.Action!, new Dictionary<string, string>
                {
                    ["inspect"] = InspectExamples,
                    ["mend"] = MendExamples,
                    [root.Name] = RootExamples,
                });
            }
        }

        return root;
    }

    private static Command Inspect(RulePack rules, Surroundings surroundings)
    {
        var path = PathArgument();
        var failOn = FailOnOption("Lowest severity that gives exit code 1.");
        var rule = RuleOption(rules);
        var sarif = new Option<string?>("--sarif")
        {
            HelpName = "FILE",
            Description = "Also write the findings as SARIF 2.1.0.",
        };
        var command = new Command("inspect", "Shows findings with the code that leads to them.") { path, failOn, rule, sarif };
        command.SetAction((parsed, cancel) => new InspectCommand(rules, surroundings).RunAsync(
            new InspectOptions(parsed.GetRequiredValue(path), LevelOf(parsed, failOn), parsed.GetValue(rule) ?? [], parsed.GetValue(sarif)),
            parsed.InvocationConfiguration.Output,
            parsed.InvocationConfiguration.Error,
            cancel));
        return command;
    }

    private static Command Mend(RulePack rules, Surroundings surroundings)
    {
        var path = PathArgument();
        var failOn = FailOnOption("Lowest severity that, left unmended, gives exit code 1.");
        var rule = RuleOption(rules);
        var write = new Option<bool>("--write") { Description = "Change the files; without it the change is only shown." };
        var command = new Command("mend", "Shows the fixes as a unified diff, or applies them.") { path, write, rule, failOn };
        command.SetAction((parsed, cancel) => new MendCommand(rules, surroundings).RunAsync(
            new MendOptions(parsed.GetRequiredValue(path), LevelOf(parsed, failOn), parsed.GetValue(rule) ?? [], parsed.GetValue(write)),
            parsed.InvocationConfiguration.Output,
            parsed.InvocationConfiguration.Error,
            cancel));
        return command;
    }

    private static Argument<string> PathArgument() => new("PATH")
    {
        Description = "A C# file, a project, a solution, or a folder that holds one of them.",
    };

    private static Option<string> FailOnOption(string description)
    {
        // Text rather than the enum, which would also take numbers and show its own capitals.
        var option = new Option<string>("--fail-on")
        {
            HelpName = "info|warning|error|never",
            Description = description,
            DefaultValueFactory = _ => "warning",
        };
        option.AcceptOnlyFromAmong("info", "warning", "error", "never");
        return option;
    }

    private static FailOn LevelOf(ParseResult parsed, Option<string> option) => Enum.Parse<FailOn>(parsed.GetRequiredValue(option), ignoreCase: true);

    private static Option<string[]> RuleOption(RulePack rules)
    {
        var option = new Option<string[]>("--rule")
        {
            HelpName = "ID",
            Description = "Only this rule; may be given several times.",
        };
        option.Validators.Add(result =>
        {
            foreach (var token in result.Tokens.Where(token => !rules.Ids.Contains(token.Value)))
            {
                result.AddError($"there is no rule '{token.Value}'; the rules are {string.Join(", ", rules.Ids)}");
            }
        });
        return option;
    }
}
