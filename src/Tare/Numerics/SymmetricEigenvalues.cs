namespace Tare;

/// <summary>Eigenvalues of a small symmetric matrix by Jacobi's rotations.</summary>
internal static class SymmetricEigenvalues
{
    /// <summary>Eigenvalues from the largest down; the matrix is overwritten.</summary>
    public static double[] Of(double[,] a)
    {
        int n = a.GetLength(0);
        for (int sweep = 0; sweep < 100; sweep++)
        {
            double off = 0;
            for (int i = 0; i < n; i++)
            {
                for (int j = 0; j < i; j++)
                    off += a[i, j] * a[i, j];
            }

            if (off < 1e-30)
                break;
            for (int p = 0; p < n; p++)
            {
                for (int q = p + 1; q < n; q++)
                    Rotate(a, p, q, n);
            }
        }

        double[] values = new double[n];
        for (int i = 0; i < n; i++)
            values[i] = a[i, i];
        Array.Sort(values);
        Array.Reverse(values);
        return values;
    }

    private static void Rotate(double[,] a, int p, int q, int n)
    {
        if (a[p, q] == 0)
            return;
        double theta = (a[q, q] - a[p, p]) / (2 * a[p, q]);
        double t = (theta >= 0 ? 1 : -1) / (Math.Abs(theta) + Math.Sqrt(theta * theta + 1));
        double c = 1 / Math.Sqrt(t * t + 1), s = t * c;
        for (int k = 0; k < n; k++)
        {
            double kp = a[k, p], kq = a[k, q];
            a[k, p] = c * kp - s * kq;
            a[k, q] = s * kp + c * kq;
        }

        for (int k = 0; k < n; k++)
        {
            double pk = a[p, k], qk = a[q, k];
            a[p, k] = c * pk - s * qk;
            a[q, k] = s * pk + c * qk;
        }
    }
}
