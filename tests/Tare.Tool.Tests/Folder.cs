using System.Text;

namespace Tare.Tool.Tests;

/// <summary>A folder of its own, outside the repository, that is gone afterwards.</summary>
public sealed class Folder : IDisposable
{
    public Folder() => Path = Directory.CreateTempSubdirectory("tare-test-").FullName;

    public string Path { get; }

    public string this[string name] => System.IO.Path.Combine(Path, name);

    public Folder With(string name, string text) => With(name, new UTF8Encoding(false).GetBytes(text));

    public Folder With(string name, byte[] bytes)
    {
        Directory.CreateDirectory(System.IO.Path.GetDirectoryName(this[name])!);
        File.WriteAllBytes(this[name], bytes);
        return this;
    }

    public string Read(string name) => File.ReadAllText(this[name]);

    public void Dispose() => Directory.Delete(Path, recursive: true);
}
