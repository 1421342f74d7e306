using System.Text;
using Tare.Tool;

try
{
    // Frames hold characters that a Windows console's own code page lacks.
    Console.OutputEncoding = new UTF8Encoding(encoderShouldEmitUTF8Identifier: false);
}
catch (IOException)
{
    // No console is attached: the stream keeps its encoding.
}

return await Application.RunAsync(args, Console.Out, Console.Error);
