using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Microsoft.CodeAnalysis.Text;
using Tare.CodeFixes.Rows;

namespace Tare.CodeFixes.Choosing;

/// <summary>The method in which a choice fell, and what is known of its rows.</summary>
internal sealed class Scene
{
    // Words beside which a role word speaks of something made from rows, not of rows.
    private static readonly HashSet<string> NotRows = new(StringComparer.OrdinalIgnoreCase)
    {
        "score", "scores", "accuracy", "accuracies", "loss", "losses", "error", "errors", "rmse", "mae", "mse", "auc", "metric", "metrics", "result", "results",
        "outcome", "outcomes", "prediction", "predictions", "predicted", "preds", "pred", "name", "names", "path", "file", "size", "count", "ratio", "fraction", "share",
    };

    private readonly HashSet<string> _test;
    private readonly HashSet<string> _training;
    private readonly HashSet<string> _validation;

    public Scene(Document document, SyntaxNode root, SemanticModel model, Diagnostic diagnostic)
    {
        Document = document;
        Root = root;
        Model = model;
        Diagnostic = diagnostic;
        Choice = root.FindNode(diagnostic.Location.SourceSpan, getInnermostNodeForTie: true);
        Frame = Choice.AncestorsAndSelf().First(n => n is LocalFunctionStatementSyntax or BaseMethodDeclarationSyntax or AccessorDeclarationSyntax or PropertyDeclarationSyntax or FieldDeclarationSyntax or CompilationUnitSyntax);
        _test = Listed("tare.rows");
        _training = Listed("tare.training");
        _validation = Listed("tare.validation");
        Text = root.SyntaxTree.GetText();
        NewLine = Code.NewLineOf(Text);
        Step = Code.StepOf(root);
        Names = new Names(Frame, model);
    }

    public Document Document { get; }

    public SyntaxNode Root { get; }

    public SemanticModel Model { get; }

    public Diagnostic Diagnostic { get; }

    /// <summary>The syntax at which the finding stands.</summary>
    public SyntaxNode Choice { get; }

    public SyntaxNode Frame { get; }

    public SourceText Text { get; }

    public string NewLine { get; }

    public string Step { get; }

    public Names Names { get; }

    /// <summary>How the test rows were cut: tail, random, stratified, group or unknown.</summary>
    public string Cut => Diagnostic.Properties.TryGetValue("tare.cut", out string? cut) && cut is not null ? cut : "unknown";

    public bool Refers(string metadataName) => Model.Compilation.GetTypeByMetadataName(metadataName) is not null;

    /// <summary>The rows that a node mentions, each mention once, outermost expression first.</summary>
    public IEnumerable<(ExpressionSyntax Syntax, RowsReference Rows)> RowsIn(SyntaxNode node)
    {
        if (node is ExpressionSyntax expression && RowsAt(expression) is { } rows)
        {
            yield return (expression, rows);
            yield break;
        }

        foreach (var child in node.ChildNodes())
        {
            // nameof(testX) is no use of rows
            if (child is InvocationExpressionSyntax { Expression: IdentifierNameSyntax { Identifier.ValueText: "nameof" } })
                continue;
            foreach (var found in RowsIn(child))
                yield return found;
        }
    }

    public bool Mentions(SyntaxNode node, RowsRole role) => RowsIn(node).Any(r => r.Rows.Role == role);

    /// <summary>The rows that an expression names, if it does nothing else.</summary>
    public RowsReference? RowsAt(ExpressionSyntax expression)
    {
        if (!IsChain(expression) || expression.Parent is MemberAccessExpressionSyntax parent && parent.Name == expression)
            return null;
        if (expression.Parent is NameColonSyntax or NameEqualsSyntax or QualifiedNameSyntax)
            return null;
        var symbol = Model.GetSymbolInfo(expression).Symbol;
        ITypeSymbol? type = symbol switch
        {
            ILocalSymbol local => local.Type,
            IParameterSymbol parameter => parameter.Type,
            IFieldSymbol field => field.Type,
            IPropertySymbol { IsIndexer: false } property => property.Type,
            _ => null,
        };
        if (symbol is null || type is null || type.TypeKind == TypeKind.Error)
            return null;
        string text = Code.Key(expression);
        var role = RoleOf(symbol, type, text);
        return role == RowsRole.None ? null : new RowsReference(text, symbol, type, role);
    }

    /// <summary>The rows that a variable or field holds, by its simple name.</summary>
    public RowsReference? RowsNamed(ISymbol symbol)
    {
        ITypeSymbol? type = symbol switch
        {
            ILocalSymbol local => local.Type,
            IParameterSymbol parameter => parameter.Type,
            IFieldSymbol { IsConst: false, IsImplicitlyDeclared: false } field => field.Type,
            _ => null,
        };
        return type is not null && RoleOf(symbol, type, symbol.Name) is var role and not RowsRole.None ? new RowsReference(symbol.Name, symbol, type, role) : null;
    }

    private RowsRole RoleOf(ISymbol symbol, ITypeSymbol type, string text)
    {
        bool listed = IsListed(_test, symbol, text) || IsListed(_training, symbol, text) || IsListed(_validation, symbol, text);
        if (!listed && !IsRowsLike(type))
            return RowsRole.None;
        if (type.SpecialType != SpecialType.None && type.TypeKind is not (TypeKind.Array or TypeKind.Interface))
            return RowsRole.None;
        return IsListed(_test, symbol, text) ? RowsRole.Test
            : IsListed(_validation, symbol, text) ? RowsRole.Validation
            : IsListed(_training, symbol, text) ? RowsRole.Training
            : ByWords(text);
    }

    private static RowsRole ByWords(string text)
    {
        if (RowsName.Words(text).Skip(1).Any(NotRows.Contains))
            return RowsRole.None;
        var parts = text.Split('.');
        for (int i = parts.Length - 1; i >= 0; i--)
        {
            var role = RowsName.RoleOf(parts[i]);
            if (role != RowsRole.None)
                return role;
        }

        return RowsRole.None;
    }

    private static bool IsChain(ExpressionSyntax expression) => expression switch
    {
        IdentifierNameSyntax => true,
        MemberAccessExpressionSyntax { Name: IdentifierNameSyntax, Expression: ThisExpressionSyntax } => true,
        MemberAccessExpressionSyntax { Name: IdentifierNameSyntax } member => IsChain(member.Expression),
        _ => false,
    };

    private static bool IsRowsLike(ITypeSymbol type) => type switch
    {
        { SpecialType: SpecialType.System_String } => false,
        IArrayTypeSymbol => true,
        { Name: "Span" or "ReadOnlySpan" or "Memory" or "ReadOnlyMemory" or "IDataView" } => true,
        { Name: "Dictionary" or "IDictionary" or "IReadOnlyDictionary" } => false,
        INamedTypeSymbol { Name: "IEnumerable" } => true,
        _ => type.AllInterfaces.Any(i => i.Name == "IEnumerable"),
    };

    private static bool IsListed(HashSet<string> names, ISymbol symbol, string text) => names.Contains(text) || (names.Contains(symbol.Name) && text.IndexOf('.') < 0) || (symbol is IFieldSymbol or IPropertySymbol && names.Contains(symbol.Name));

    private HashSet<string> Listed(string key) =>
        new(Diagnostic.Properties.TryGetValue(key, out string? names) && names is not null ? names.Split(',').Where(n => n.Length > 0) : Array.Empty<string>(), StringComparer.Ordinal);
}
