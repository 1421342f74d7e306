using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CodeFixes;

namespace Tare.Tool.Mending;

/// <summary>Hands a fix-all exactly the diagnostics that are to be fixed.</summary>
internal sealed class KnownDiagnostics(IEnumerable<Proposal> proposals) : FixAllContext.DiagnosticProvider
{
    private readonly ILookup<DocumentId, Diagnostic> _byDocument = proposals.ToLookup(proposal => proposal.Document.Id, proposal => proposal.Diagnostic);

    public override Task<IEnumerable<Diagnostic>> GetDocumentDiagnosticsAsync(Document document, CancellationToken cancellationToken) =>
        Task.FromResult(_byDocument[document.Id]);

    public override Task<IEnumerable<Diagnostic>> GetProjectDiagnosticsAsync(Project project, CancellationToken cancellationToken) =>
        Task.FromResult<IEnumerable<Diagnostic>>([]);

    public override Task<IEnumerable<Diagnostic>> GetAllDiagnosticsAsync(Project project, CancellationToken cancellationToken) =>
        Task.FromResult(project.DocumentIds.SelectMany(id => _byDocument[id]));
}
