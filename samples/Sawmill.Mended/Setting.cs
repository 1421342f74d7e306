namespace Sawmill;

/// <summary>How a board is compared with known ones: how many neighbours vote, and which readings tell the distance.</summary>
internal sealed record Setting(int Neighbours, int[] Readings)
{
    public override string ToString() => $"{Neighbours} neighbours on readings {string.Join('+', Readings)}";
}
