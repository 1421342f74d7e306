namespace Sawmill;

/// <summary>Lets the most similar known boards vote on whether a board will warp.</summary>
internal sealed class NearestBoards
{
    private readonly double[][] _readings;
    private readonly bool[] _warped;
    private readonly Setting _setting;

    private NearestBoards(double[][] readings, bool[] warped, Setting setting)
    {
        _readings = readings;
        _warped = warped;
        _setting = setting;
    }

    public static NearestBoards Fit(double[][] x, bool[] y, Setting setting) => new(x, y, setting);

    public bool Predict(double[] board)
    {
        // The nearest so far, nearest first.
        Span<double> distances = stackalloc double[_setting.Neighbours];
        Span<bool> votes = stackalloc bool[_setting.Neighbours];
        distances.Fill(double.PositiveInfinity);
        for (int i = 0; i < _readings.Length; i++)
        {
            double distance = 0;
            foreach (int reading in _setting.Readings)
                distance += (board[reading] - _readings[i][reading]) * (board[reading] - _readings[i][reading]);
            int place = distances.Length;
            while (place > 0 && distance < distances[place - 1])
                place--;
            if (place == distances.Length)
                continue;
            distances[place..^1].CopyTo(distances[(place + 1)..]);
            votes[place..^1].CopyTo(votes[(place + 1)..]);
            (distances[place], votes[place]) = (distance, _warped[i]);
        }

        return votes.Count(true) > votes.Length / 2;
    }

    public double Accuracy(double[][] x, bool[] y)
    {
        int right = 0;
        for (int i = 0; i < x.Length; i++)
            right += Predict(x[i]) == y[i] ? 1 : 0;
        return (double)right / x.Length;
    }
}
