namespace Tare.Tool.Printing;

/// <summary>Shows nothing: nobody watches.</summary>
internal sealed class NoProgress : IProgressDisplay
{
    public Task<T> ShowAsync<T>(string title, Func<Action<string>, Task<T>> work) => work(_ => { });
}
