using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp.Syntax;

namespace Tare.Analyzers.Flow;

/// <summary>
/// The compiler turns nested statements and call chains into operations recursively and without a guard: ten thousand
/// levels, which generated code has, overflow the stack and end the process. Bodies that deep are not followed.
/// </summary>
internal static class Nesting
{
    private const int Limit = 500;

    /// <summary>Whether a body nests too deep to be bound. Long operator chains do not count: the compiler unrolls them.</summary>
    public static bool IsTooDeep(SyntaxNode body)
    {
        var open = new Stack<(SyntaxNode Node, int Depth)>();
        open.Push((body, 0));
        while (open.Count > 0)
        {
            var (node, depth) = open.Pop();
            if (depth > Limit)
                return true;
            foreach (var child in node.ChildNodes())
            {
                // Of a compilation unit only the top-level statements are the body.
                if (child is MemberDeclarationSyntax and not GlobalStatementSyntax)
                    continue;
                bool chain = node is BinaryExpressionSyntax operation && operation.Left == child;
                open.Push((child, chain ? depth : depth + 1));
            }
        }

        return false;
    }
}
