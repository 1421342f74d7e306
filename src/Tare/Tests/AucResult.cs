namespace Tare;

/// <summary>Area under the ROC curve with DeLong's standard error.</summary>
/// <param name="Value">Share of positive–negative pairs ranked rightly, ties counting half.</param>
/// <param name="StandardError">DeLong's standard error; 0 when one class has a single row or all pairs rank alike.</param>
/// <param name="Interval">Normal interval, cut to [0,1].</param>
/// <param name="Degenerate">True when the standard error says nothing: AUC exactly 0 or 1, or a class with a single row.</param>
public readonly record struct AucResult(double Value, double StandardError, Interval Interval, bool Degenerate)
{
    /// <summary>One plain line, in the invariant culture.</summary>
    /// <returns>Such as <c>AUC 0.875, 0.63 to 1 (95 % DeLong)</c>.</returns>
    public override string ToString() => $"AUC {Plain.Number(Value)}, {Interval}" + (Degenerate ? " (degenerate data)" : "");
}
