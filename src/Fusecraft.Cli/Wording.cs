using System.Globalization;
using System.Numerics;

namespace Fusecraft.Cli;

/// <summary>Numbers as they stand in sentences; the same under every culture.</summary>
internal static class Wording
{
    /// <summary>All digits, in groups of three.</summary>
    public static string Number(BigInteger number) => number.ToString("N0", CultureInfo.InvariantCulture);

    /// <summary>A number with its noun: <c>1 block</c>, <c>2,000 blocks</c>.</summary>
    public static string Count(BigInteger number, string noun) => Number(number) + " " + noun + (number.IsOne ? "" : "s");
}
