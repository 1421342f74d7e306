using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.CodeFixes.Rows;

namespace Tare.CodeFixes.Choosing;

/// <summary>Gives helpers the rows that they take from around them as parameters, so that each call can say which rows it means.</summary>
internal static class CapturedRows
{
    private const int MostHelpers = 8;

    /// <summary>Whether any helper was changed.</summary>
    public static bool Lift(Scene scene, Edits edits)
    {
        var helpers = HelpersOf(scene);
        if (helpers is null || helpers.Count == 0)
            return false;

        // A helper that calls another needs the other's rows too.
        var rows = helpers.ToDictionary(h => h, h => scene.RowsIn(Body(h)).Where(r => IsCaptured(scene, r.Rows, h)).Select(r => r.Rows).GroupBy(r => r.Text).Select(g => g.First()).ToList());
        for (int round = 0; round < helpers.Count; round++)
        {
            foreach (var helper in helpers)
            {
                foreach (var called in Called(scene, Body(helper), helpers))
                    rows[helper].AddRange(rows[called].Where(r => rows[helper].All(own => own.Text != r.Text)).ToList());
            }
        }

        var names = helpers.ToDictionary(h => h, h => rows[h].ToDictionary(r => r.Text, r => scene.Names.Free(RowsName.With(r.Name, r.Role == RowsRole.Test ? "scored" : "known"))));
        foreach (var helper in helpers)
        {
            var list = Parameters(helper);
            string added = string.Join(", ", rows[helper].Select(r => $"{r.Type.WithNullableAnnotation(NullableAnnotation.None).ToMinimalDisplayString(scene.Model, helper.SpanStart)} {names[helper][r.Text]}"));
            if (list.Parameters.Any(p => p.Default is not null || p.Modifiers.Any(SyntaxKind.ParamsKeyword)))
                return false;
            edits.Insert(list.CloseParenToken.SpanStart, (list.Parameters.Count > 0 ? ", " : "") + added);
            foreach (var (syntax, one) in scene.RowsIn(Body(helper)))
            {
                if (names[helper].TryGetValue(one.Text, out string? name))
                    edits.Replace(syntax, name);
            }
        }

        foreach (var use in scene.Root.DescendantNodes().OfType<SimpleNameSyntax>())
        {
            if (scene.Model.GetSymbolInfo(use).Symbol is not IMethodSymbol method || helpers.FirstOrDefault(h => IsDeclaredBy(method, h)) is not { } helper)
                continue;
            var around = helpers.FirstOrDefault(h => Body(h).Span.Contains(use.Span));
            string arguments = string.Join(", ", rows[helper].Select(r => around is not null && names[around].TryGetValue(r.Text, out string? name) ? name : r.Text));
            ExpressionSyntax called = use.Parent is MemberAccessExpressionSyntax access && access.Name == use ? access : use;
            if (called.Parent is InvocationExpressionSyntax call && call.Expression == called)
            {
                edits.Insert(call.ArgumentList.CloseParenToken.SpanStart, (call.ArgumentList.Arguments.Count > 0 ? ", " : "") + arguments);
            }
            else if (called.Parent is ArgumentSyntax && Parameters(helper).Parameters.Count == 1)
            {
                // A method group becomes a lambda.
                string parameter = scene.Names.Free(Parameters(helper).Parameters[0].Identifier.Text, "candidate");
                edits.Replace(called, $"{parameter} => {called}({parameter}, {arguments})");
            }
            else if (use.Parent is not (InvocationExpressionSyntax { Expression: IdentifierNameSyntax { Identifier.ValueText: "nameof" } }))
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>Helpers, and theirs, that the method calls and that take test rows from around them.</summary>
    private static List<SyntaxNode>? HelpersOf(Scene scene)
    {
        var found = new List<SyntaxNode>();
        var open = new Queue<SyntaxNode>();
        open.Enqueue(scene.Frame);
        var seen = new HashSet<SyntaxNode>();
        while (open.Count > 0)
        {
            var place = open.Dequeue();
            foreach (var name in place.DescendantNodes().OfType<SimpleNameSyntax>())
            {
                if (scene.Model.GetSymbolInfo(name).Symbol is not IMethodSymbol { DeclaringSyntaxReferences.Length: 1 } method)
                    continue;
                var declared = method.DeclaringSyntaxReferences[0].GetSyntax();
                if (declared.SyntaxTree != scene.Root.SyntaxTree || !seen.Add(declared) || declared == scene.Frame || declared.Span.Contains(scene.Frame.Span))
                    continue;
                bool own = declared is LocalFunctionStatementSyntax
                    || (declared is MethodDeclarationSyntax && method.DeclaredAccessibility == Accessibility.Private && method.ContainingType.DeclaringSyntaxReferences.Length == 1);
                if (!own || Body(declared) is null || declared.Span.Contains(scene.Choice.Span))
                    continue;
                open.Enqueue(declared);
                found.Add(declared);
                if (found.Count > MostHelpers)
                    return null;
            }
        }

        // Only those from which test rows are reached.
        bool Reaches(SyntaxNode helper, int depth) => scene.RowsIn(Body(helper)).Any(r => r.Rows.Role is RowsRole.Test or RowsRole.Training && IsCaptured(scene, r.Rows, helper))
            || (depth < MostHelpers && Called(scene, Body(helper), found).Any(c => c != helper && Reaches(c, depth + 1)));
        return found.Where(h => Reaches(h, 0)).ToList();
    }

    private static IEnumerable<SyntaxNode> Called(Scene scene, SyntaxNode body, List<SyntaxNode> helpers) => body.DescendantNodes().OfType<SimpleNameSyntax>()
        .Select(n => scene.Model.GetSymbolInfo(n).Symbol as IMethodSymbol).Where(m => m is not null)
        .Select(m => helpers.FirstOrDefault(h => IsDeclaredBy(m!, h))).OfType<SyntaxNode>().Distinct();

    private static bool IsDeclaredBy(IMethodSymbol method, SyntaxNode helper) => method.DeclaringSyntaxReferences.Length == 1 && method.DeclaringSyntaxReferences[0].Span == helper.Span && method.DeclaringSyntaxReferences[0].SyntaxTree == helper.SyntaxTree;

    private static bool IsCaptured(Scene scene, RowsReference rows, SyntaxNode helper)
    {
        if (rows.Role is not (RowsRole.Test or RowsRole.Training))
            return false;
        string root = rows.Text.Split('.')[0];
        var symbol = rows.Text.IndexOf('.') < 0 ? rows.Symbol : scene.Model.LookupSymbols(Body(helper).SpanStart, name: root).FirstOrDefault() ?? rows.Symbol;
        return symbol is IFieldSymbol or IPropertySymbol || symbol.DeclaringSyntaxReferences.Length == 1 && !helper.Span.Contains(symbol.DeclaringSyntaxReferences[0].Span);
    }

    private static SyntaxNode Body(SyntaxNode helper) => helper switch
    {
        LocalFunctionStatementSyntax local => (SyntaxNode?)local.Body ?? local.ExpressionBody!,
        MethodDeclarationSyntax method => (SyntaxNode?)method.Body ?? method.ExpressionBody!,
        _ => helper,
    };

    private static ParameterListSyntax Parameters(SyntaxNode helper) => helper is LocalFunctionStatementSyntax local ? local.ParameterList : ((MethodDeclarationSyntax)helper).ParameterList;
}
