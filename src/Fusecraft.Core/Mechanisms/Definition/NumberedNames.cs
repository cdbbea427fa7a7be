using System.Collections.Immutable;
using System.Globalization;

namespace Fusecraft.Mechanisms;

/// <summary>The names <c>1</c>, <c>2</c>, …, <c>n</c>, which a file gives as the count <c>n</c>.</summary>
internal static class NumberedNames
{
    internal static ImmutableArray<string> Of(int count) => [.. Enumerable.Range(1, count).Select(Name)];

    internal static bool Are(ImmutableArray<string> names) => names.Select((name, i) => name == Name(i + 1)).All(static same => same);

    private static string Name(int number) => number.ToString(CultureInfo.InvariantCulture);
}
