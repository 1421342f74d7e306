namespace Sawmill;

/// <summary>How strongly weights are held back, and which readings the model sees.</summary>
internal sealed record Setting(float Penalty, string[] Readings)
{
    public override string ToString() => $"penalty {Penalty} on {string.Join('+', Readings)}";
}
