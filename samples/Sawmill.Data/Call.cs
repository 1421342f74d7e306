namespace Sawmill;

/// <summary>What the sample programs are asked on the command line: <c>--seed N</c> (default 1) and <c>--signal</c>.</summary>
public sealed record Call(int Seed, bool Signal)
{
    public static Call Read(string[] args)
    {
        int at = Array.IndexOf(args, "--seed");
        int seed = at >= 0 && at + 1 < args.Length ? int.Parse(args[at + 1]) : 1;
        return new Call(seed, args.Contains("--signal"));
    }
}
