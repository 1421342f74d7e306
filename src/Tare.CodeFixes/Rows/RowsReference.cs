using Microsoft.CodeAnalysis;

namespace Tare.CodeFixes.Rows;

/// <summary>Rows as code names them: a variable, a field, or a member of a split such as <c>split.TrainSet</c>.</summary>
internal sealed class RowsReference
{
    public RowsReference(string text, ISymbol symbol, ITypeSymbol type, RowsRole role)
    {
        Text = text;
        Symbol = symbol;
        Type = type;
        Role = role;
    }

    /// <summary>The code that names them, without white space.</summary>
    public string Text { get; }

    public ISymbol Symbol { get; }

    public ITypeSymbol Type { get; }

    public RowsRole Role { get; }

    /// <summary>The part of the text that tells rows of one role apart from their parallels.</summary>
    public string Stem => RowsName.Stem(Text.Replace("this.", ""));

    /// <summary>The last identifier: what names made from these rows are like.</summary>
    public string Name => Symbol.Name;
}
