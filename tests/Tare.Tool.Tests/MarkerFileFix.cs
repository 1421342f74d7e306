using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeActions;
using Microsoft.CodeAnalysis.CodeFixes;
using Microsoft.CodeAnalysis.Text;

namespace Tare.Tool.Tests;

/// <summary>Makes `extra` a constant of a type that stands in a file of its own; one finding only, and a fix-all of its own because the usual one drops new files.</summary>
[ExportCodeFixProvider(LanguageNames.CSharp)]
public sealed class MarkerFileFix : CodeFixProvider
{
    public override ImmutableArray<string> FixableDiagnosticIds => ["TEST007"];

    public override FixAllProvider GetFixAllProvider() => new FirstOnly();

    public override Task RegisterCodeFixesAsync(CodeFixContext context)
    {
        context.RegisterCodeFix(Action(context.Document, context.Diagnostics[0]), context.Diagnostics);
        return Task.CompletedTask;
    }

    private static CodeAction Action(Document document, Diagnostic diagnostic) =>
        CodeAction.Create("Add a file", cancel => AddAsync(document, diagnostic, cancel), "add");

    private static async Task<Solution> AddAsync(Document document, Diagnostic diagnostic, CancellationToken cancel)
    {
        var text = await document.GetTextAsync(cancel);
        var changed = document.WithText(text.WithChanges(new TextChange(diagnostic.Location.SourceSpan, "plain = Added.One")));
        return changed.Project.AddDocument("Added.cs", "static class Added { public const int One = 1; }\n").Project.Solution;
    }

    private sealed class FirstOnly : FixAllProvider
    {
        public override async Task<CodeAction?> GetFixAsync(FixAllContext fixAllContext)
        {
            var diagnostics = await fixAllContext.GetDocumentDiagnosticsAsync(fixAllContext.Document!);
            return Action(fixAllContext.Document!, diagnostics[0]);
        }
    }
}
