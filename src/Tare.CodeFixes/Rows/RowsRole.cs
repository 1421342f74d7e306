namespace Tare.CodeFixes.Rows;

/// <summary>What rows are for.</summary>
internal enum RowsRole
{
    None,
    Training,
    Validation,
    Test,
}
