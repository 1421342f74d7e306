namespace Tare;

/// <summary>
/// The splits' own random source, so that one seed gives one split on every target framework and for ever.
/// </summary>
/// <remarks>SplitMix64: Steele, Lea and Flood 2014, Fast splittable pseudorandom number generators, OOPSLA. Rejection makes every index equally likely.</remarks>
internal sealed class SplitRandom
{
    private ulong _state;

    public SplitRandom(int seed) => _state = unchecked((ulong)seed * 0xD1342543DE82EF95UL + 0x2545F4914F6CDD1DUL);

    /// <summary>One of many streams of a seed, each as good as independent of the others.</summary>
    public SplitRandom(int seed, long stream)
        : this(seed)
    {
        unchecked
        {
            ulong own = Next() + (ulong)stream * 0xD1B54A32D192ED03UL;
            own = (own ^ (own >> 32)) * 0xD6E8FEB86659FD93UL;
            _state ^= own ^ (own >> 32);
        }
    }

    /// <summary>A whole number from 0 to below <paramref name="bound"/>.</summary>
    public int Below(int bound)
    {
        ulong width = (ulong)bound;
        ulong limit = ulong.MaxValue - ulong.MaxValue % width;
        ulong draw;
        do
        {
            draw = Next();
        }
        while (draw >= limit);
        return (int)(draw % width);
    }

    /// <summary>A number strictly between 0 and 1, in steps of 2^-53.</summary>
    public double Fraction() => ((Next() >> 11) + 0.5) * (1.0 / 9007199254740992);

    /// <summary>64 random bits.</summary>
    public ulong Bits() => Next();

    /// <summary>Durstenfeld's shuffle (1964).</summary>
    public void Shuffle(int[] items)
    {
        for (int i = items.Length - 1; i > 0; i--)
        {
            int j = Below(i + 1);
            (items[i], items[j]) = (items[j], items[i]);
        }
    }

    private ulong Next()
    {
        unchecked
        {
            ulong z = _state += 0x9E3779B97F4A7C15UL;
            z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9UL;
            z = (z ^ (z >> 27)) * 0x94D049BB133111EBUL;
            return z ^ (z >> 31);
        }
    }
}
