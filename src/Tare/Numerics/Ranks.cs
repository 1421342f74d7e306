namespace Tare;

/// <summary>Midranks: equal values share the mean of their places.</summary>
internal static class Ranks
{
    public static double[] Mid(double[] values)
    {
        int n = values.Length;
        double[] sorted = (double[])values.Clone();
        int[] order = new int[n];
        for (int i = 0; i < n; i++)
            order[i] = i;
        Array.Sort(sorted, order);
        double[] ranks = new double[n];
        for (int start = 0; start < n;)
        {
            int end = start + 1;
            while (end < n && sorted[end] == sorted[start])
                end++;
            for (int i = start; i < end; i++)
                ranks[order[i]] = 0.5 * (start + 1 + end);
            start = end;
        }

        return ranks;
    }
}
