namespace Tare;

/// <summary>Both tails of a law at one point, with logarithms for where the tail itself leaves the range of a double.</summary>
internal readonly record struct Tails(double Lower, double Upper, double LogLower, double LogUpper);
