namespace Tare.Tool.Printing;

/// <summary>Shows that long work goes on.</summary>
internal interface IProgressDisplay
{
    /// <summary>Runs the work, which may say at any time what it is at.</summary>
    Task<T> ShowAsync<T>(string title, Func<Action<string>, Task<T>> work);
}
