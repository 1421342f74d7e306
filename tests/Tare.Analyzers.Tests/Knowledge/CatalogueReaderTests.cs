using Microsoft.CodeAnalysis.Text;
using Tare.Analyzers.Knowledge;

namespace Tare.Analyzers.Tests.Knowledge;

public class CatalogueReaderTests
{
    [Fact]
    public void A_line_gives_id_effect_and_keys()
    {
        var text = Read("# Kiln readings\n\n  M:Sawmill.Kiln.Split(*)  =  splits rows:boards seed:seed group:lot,kiln  # by lot\r\nP:Sawmill.Report.Warped = metric better:lower\n");
        Assert.Empty(text.Errors);
        Assert.Equal(2, text.Entries.Length);
        var split = text.Entries[0];
        Assert.Equal("M:Sawmill.Kiln.Split", split.Id);
        Assert.True(split.AllOverloads);
        Assert.Equal(("Kiln", "Split", "Split"), (split.TypeName, split.MemberName, split.SimpleName));
        Assert.Equal(CatalogueEffect.Splits, split.Effect);
        Assert.Equal("lot,kiln", string.Join(",", split[CatalogueKey.Group]));
        Assert.True(split.Names(CatalogueKey.Rows, "boards"));
        Assert.False(split.Names(CatalogueKey.Rows, "seed"));
        Assert.Equal(2, split.Line);
        Assert.False(text.Entries[1].HigherIsBetter);
    }

    [Theory]
    [InlineData("M:A.B.#ctor(System.Int32) = carries", "B", ".ctor")]
    [InlineData("M:A.B`2.C``1(`0,``0,System.Collections.Generic.List{System.Int32[0:,0:]}@) = carries", "B`2", "C")]
    [InlineData("M:A.B.op_Explicit(A.B)~System.Double = carries", "B", "op_Explicit")]
    [InlineData("P:A.B.Item(System.Int32) = carries", "B", "Item")]
    [InlineData("T:A.B`1 = carries", "B`1", "")]
    [InlineData("F:B.c=carries", "B", "c")]
    [InlineData("T:B = nothing", "B", "")]
    public void An_id_is_taken_apart(string line, string type, string member)
    {
        var text = Read(line);
        Assert.Empty(text.Errors);
        Assert.Equal((type, member), (text.Entries[0].TypeName, text.Entries[0].MemberName));
    }

    [Theory]
    [InlineData("M:A.B.C", "M:A.B.C")]
    [InlineData("= carries", "=")]
    [InlineData("M:A.B.C =", "=")]
    [InlineData("M:A.B.C = # carries", "=")]
    [InlineData("A.B.C = carries", "A.B.C")]
    [InlineData("E:A.B.C = carries", "E:A.B.C")]
    [InlineData("M: = carries", "M:")]
    [InlineData("M:C = carries", "M:C")]
    [InlineData("M:A..C = carries", "M:A..C")]
    [InlineData("M:A.B. = carries", "M:A.B.")]
    [InlineData("M:A.1B.C = carries", "M:A.1B.C")]
    [InlineData("M:A.B C = carries", "M:A.B C")]
    [InlineData("M:A.B.#ctr = carries", "M:A.B.#ctr")]
    [InlineData("P:A.B.#ctor = carries", "P:A.B.#ctor")]
    [InlineData("M:A.B.# = carries", "M:A.B.#")]
    [InlineData("M:A.B.C( = carries", "M:A.B.C(")]
    [InlineData("M:A.B.C(System.Int32 = carries", "M:A.B.C(System.Int32")]
    [InlineData("M:A.B.C(System.Int32)) = carries", "M:A.B.C(System.Int32))")]
    [InlineData("M:A.B.C() = carries", "M:A.B.C()")]
    [InlineData("M:A.B.C(System.Int32)(*) = carries", "M:A.B.C(System.Int32)(*)")]
    [InlineData("M:A.B.C``1(*) = carries", "M:A.B.C``1(*)")]
    [InlineData("M:A.B.C`1 = carries", "M:A.B.C`1")]
    [InlineData("M:A.B.C`` = carries", "M:A.B.C``")]
    [InlineData("T:A.B(*) = carries", "T:A.B(*)")]
    [InlineData("F:A.B.C(*) = carries", "F:A.B.C(*)")]
    [InlineData("F:A.B.C(System.Int32) = carries", "F:A.B.C(System.Int32)")]
    [InlineData("T:A.#B = carries", "T:A.#B")]
    [InlineData("M:A.B.C = judges", "judges")]
    [InlineData("M:A.B.C = Carries", "Carries")]
    [InlineData("M:A.B.C = fits", "fits")]
    [InlineData("M:A.B.C = fits rows", "rows")]
    [InlineData("M:A.B.C = fits rows:", "")]
    [InlineData("M:A.B.C = fits rows:a,", "")]
    [InlineData("M:A.B.C = fits rows:a-b", "a-b")]
    [InlineData("M:A.B.C = fits rows:a,a", "a")]
    [InlineData("M:A.B.C = fits rows:a rows:b", "rows:b")]
    [InlineData("M:A.B.C = fits lines:a", "lines:a")]
    [InlineData("M:A.B.C = fits rows:a level:b", "level:b")]
    [InlineData("M:A.B.C = nothing rows:a", "rows:a")]
    [InlineData("M:A.B.C = part role:testing", "testing")]
    [InlineData("M:A.B.C = part", "part")]
    [InlineData("M:A.B.C = metric better:lower,higher", "better:lower,higher")]
    [InlineData("M:A.B.C = = carries", "=")]
    [InlineData("M:D.E.F = carries", "M:D.E.F")]
    public void A_damaged_line_gives_one_error_at_that_line_and_no_entry(string line, string marked)
    {
        var before = "# first\nM:D.E.F = carries\r\n";
        var source = before + line + "\nM:G.H.I = nothing\n";
        var text = Read(source);
        var error = Assert.Single(text.Errors);
        Assert.Equal(2, error.Line);
        Assert.Equal(marked, source.Substring(error.Span.Start, error.Span.Length));
        Assert.InRange(error.Span.Start, before.Length, before.Length + line.Length);
        Assert.Equal(["M:D.E.F", "M:G.H.I"], text.Entries.Select(e => e.Id));
        Assert.EndsWith(".", error.Reason);
        Assert.DoesNotContain('\n', error.Reason);
    }

    [Fact]
    public void Text_cut_off_or_changed_anywhere_never_throws()
    {
        const string Line = "M:A.B`1.C``2(`0,System.Func{``0,``1}[])~X.Y = crossvalidates rows:boards,this model:m group:lot seed:s # c";
        Assert.Empty(Read(Line).Errors);
        for (var i = 0; i < Line.Length; i++)
        {
            Check(Line[..i]);
            Check(Line[i..]);
            foreach (var c in ":=#`.,(){}[]~* \t\r\n\u2028\0é𝛼")
            {
                Check(Line[..i] + c + Line[i..]);
                Check(Line[..i] + c + Line[(i + 1)..]);
            }
        }

        static void Check(string source)
        {
            var text = Read(source);
            Assert.All(text.Errors, e => Assert.InRange(e.Span.End, 0, source.Length));
            Assert.Equal(text.Errors.Length, text.Errors.Select(e => e.Line).Distinct().Count());
        }
    }

    private static CatalogueText Read(string text) => CatalogueReader.Read(SourceText.From(text));
}
