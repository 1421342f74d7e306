using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using Tare.CodeFixes.Choosing;

namespace Tare.CodeFixes.Rows;

/// <summary>The code that holds validation rows out of training rows, and the names of both parts.</summary>
internal sealed class HeldOutRows
{
    private const string Share = "0.25";
    private readonly Scene _scene;
    private readonly IReadOnlyList<RowsReference> _training;
    private readonly string[] _fit;
    private readonly string[] _valid;

    private HeldOutRows(Scene scene, IReadOnlyList<RowsReference> training)
    {
        _scene = scene;
        _training = training;
        var names = scene.Names.FreeTogether(training.Select(t => RowsName.With(t.Name, "fit")).Concat(training.Select(t => RowsName.With(t.Name, "valid"))).ToList());
        _fit = names.Take(training.Count).ToArray();
        _valid = names.Skip(training.Count).ToArray();
    }

    public List<string> Lines { get; } = new();

    public string? Using { get; private set; }

    /// <summary>The rows to fit candidates on, for each training rows' code.</summary>
    public Dictionary<string, string> Fit { get; } = new(StringComparer.Ordinal);

    /// <summary>The rows to score candidates on, for each test rows' code.</summary>
    public Dictionary<string, string> Valid { get; } = new(StringComparer.Ordinal);

    /// <summary>Null when no code is known that holds out rows of these types, or when the test rows have no counterpart.</summary>
    public static HeldOutRows? Of(Scene scene, IReadOnlyList<RowsReference> training, IReadOnlyList<RowsReference> test)
    {
        if (training.Count == 0)
            return null;
        var pairs = Pair(test, training);
        if (pairs is null)
            return null;
        var held = new HeldOutRows(scene, training);
        if (!held.Write())
            return null;
        for (int i = 0; i < training.Count; i++)
            held.Fit[training[i].Text] = held._fit[i];
        foreach (var pair in pairs)
            held.Valid[pair.Key.Text] = held._valid[training.ToList().IndexOf(pair.Value)];
        return held;
    }

    /// <summary>Which rows of another role each rows correspond to: by what their names share, else by their types.</summary>
    public static Dictionary<RowsReference, RowsReference>? Pair(IReadOnlyList<RowsReference> from, IReadOnlyList<RowsReference> to)
    {
        var pairs = new Dictionary<RowsReference, RowsReference>();
        foreach (var rows in from)
        {
            var same = to.Where(t => t.Stem == rows.Stem).ToList();
            var match = same.Count == 1 ? same[0] : null;
            if (match is null)
            {
                var fitting = to.Where(t => SymbolEqualityComparer.Default.Equals(t.Type, rows.Type)).ToList();
                match = fitting.Count == 1 ? fitting[0] : fitting.Count > 1 && from.Count == to.Count ? to[from.ToList().IndexOf(rows)] : to.Count == 1 && from.Count == 1 ? to[0] : null;
            }

            if (match is null || pairs.ContainsValue(match))
                return null;
            pairs[rows] = match;
        }

        return pairs;
    }

    private bool Write()
    {
        bool random = _scene.Cut is "random" or "stratified";
        if (_training.All(t => t.Type.Name == "IDataView"))
            return _training.Count == 1 && WriteDataView(random);
        if (_scene.Refers("Tare.HoldOut") && WriteHoldOut(random))
            return true;
        return WriteSlices(random);
    }

    private bool WriteHoldOut(bool random)
    {
        string call = random ? "Random" : "Tail";
        string last = random ? ", share: " + Share + ", seed: 1)" : ", share: " + Share + ")";
        var types = _training.Select(t => t.Type).ToList();
        bool arrays = types.All(t => t is IArrayTypeSymbol { Rank: 1 }), lists = types.All(IsList);
        if (_training.Count == 2 && (arrays || lists))
        {
            Lines.Add($"var ({_fit[0]}, {_fit[1]}, {_valid[0]}, {_valid[1]}) = HoldOut.{call}({_training[0].Text}, {_training[1].Text}{last};");
            Using = "Tare";
            return true;
        }

        if (_training.Count == 1 && (arrays || lists))
        {
            Lines.Add($"var ({_fit[0]}, {_valid[0]}) = HoldOut.{call}({_training[0].Text}{last};");
            Using = "Tare";
            return true;
        }

        return false;
    }

    private bool WriteDataView(bool random)
    {
        string rows = _training[0].Text;
        if (_scene.Refers("Tare.DataViewHoldOut"))
        {
            Lines.Add(random
                ? $"var ({_fit[0]}, {_valid[0]}) = DataViewHoldOut.Random({rows}, share: {Share}, seed: 1);"
                : $"var ({_fit[0]}, {_valid[0]}) = DataViewHoldOut.Tail({rows}, share: {Share});");
            Using = "Tare";
            return true;
        }

        // TrainTestSplit draws at random: rows cut from the end have no such counterpart there.
        if (_scene.Cut == "tail" || ContextName() is not { } context)
            return false;
        string split = _scene.Names.Free("heldOut");
        Lines.Add($"var {split} = {context}.Data.TrainTestSplit({rows}, testFraction: {Share}, seed: 1);");
        Lines.Add($"var ({_fit[0]}, {_valid[0]}) = ({split}.TrainSet, {split}.TestSet);");
        return true;
    }

    private string? ContextName() => _scene.Frame.DescendantNodes().OfType<IdentifierNameSyntax>()
        .FirstOrDefault(n => n.SpanStart < _scene.Choice.SpanStart && _scene.Model.GetTypeInfo(n).Type?.Name == "MLContext" && _scene.Model.GetSymbolInfo(n).Symbol is ILocalSymbol or IParameterSymbol or IFieldSymbol)?.Identifier.ValueText;

    private bool WriteSlices(bool random)
    {
        string first = _training[0].Text;
        if (CountOf(_training[0]) is not { } length)
            return false;
        bool ordered = random && _training.All(t => t.Type is IArrayTypeSymbol { Rank: 1 } || IsList(t.Type));
        if (random && !ordered)
            return false;
        string count = _scene.Names.Free("fitCount");
        Lines.Add($"int {count} = {length} * 3 / 4;");
        string order = "";
        if (ordered)
        {
            order = _scene.Names.Free("order");
            string random1 = _scene.Names.Free("draw");
            Lines.Add($"var {random1} = new Random(1);");
            Lines.Add($"int[] {order} = Enumerable.Range(0, {length}).OrderBy(_ => {random1}.Next()).ToArray();");
        }

        for (int i = 0; i < _training.Count; i++)
        {
            string rows = _training[i].Text, fit = _fit[i], valid = _valid[i];
            switch (_training[i].Type)
            {
                case IArrayTypeSymbol { Rank: 1 } when ordered:
                    Lines.Add($"var {fit} = {order}.Take({count}).Select(i => {rows}[i]).ToArray();");
                    Lines.Add($"var {valid} = {order}.Skip({count}).Select(i => {rows}[i]).ToArray();");
                    break;
                case { } list when IsList(list) && ordered:
                    Lines.Add($"var {fit} = {order}.Take({count}).Select(i => {rows}[i]).ToList();");
                    Lines.Add($"var {valid} = {order}.Skip({count}).Select(i => {rows}[i]).ToList();");
                    break;
                case IArrayTypeSymbol { Rank: 1 } or { Name: "Span" or "ReadOnlySpan" or "Memory" or "ReadOnlyMemory" }:
                    Lines.Add($"var {fit} = {rows}[..{count}];");
                    Lines.Add($"var {valid} = {rows}[{count}..];");
                    break;
                case IArrayTypeSymbol { Rank: 2 } matrix:
                    string element = matrix.ElementType.ToMinimalDisplayString(_scene.Model, _scene.Choice.SpanStart);
                    Lines.Add($"var {fit} = new {element}[{count}, {rows}.GetLength(1)];");
                    Lines.Add($"var {valid} = new {element}[{rows}.GetLength(0) - {count}, {rows}.GetLength(1)];");
                    Lines.Add($"Array.Copy({rows}, {fit}, {fit}.Length);");
                    Lines.Add($"Array.Copy({rows}, {fit}.Length, {valid}, 0, {valid}.Length);");
                    break;
                case { } list when IsList(list):
                    Lines.Add($"var {fit} = {rows}.GetRange(0, {count});");
                    Lines.Add($"var {valid} = {rows}.GetRange({count}, {rows}.Count - {count});");
                    break;
                case { TypeKind: TypeKind.Interface } or { Name: "ImmutableArray" }:
                    Lines.Add($"var {fit} = {rows}.Take({count}).ToList();");
                    Lines.Add($"var {valid} = {rows}.Skip({count}).ToList();");
                    break;
                default:
                    return false;
            }
        }

        return first.Length > 0;
    }

    private static string? CountOf(RowsReference rows) => rows.Type switch
    {
        IArrayTypeSymbol { Rank: 1 } or { Name: "Span" or "ReadOnlySpan" or "Memory" or "ReadOnlyMemory" or "ImmutableArray" } => rows.Text + ".Length",
        IArrayTypeSymbol => rows.Text + ".GetLength(0)",
        { Name: "IEnumerable" } => rows.Text + ".Count()",
        { } type when IsList(type) || type.TypeKind == TypeKind.Interface => rows.Text + ".Count",
        _ => null,
    };

    private static bool IsList(ITypeSymbol type) => type is INamedTypeSymbol { Name: "List", ContainingNamespace.Name: "Generic" };
}
