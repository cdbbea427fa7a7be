namespace Fusecraft.Tests.Reference;

/// <summary>What <c>groups.py</c> writes of one group. Counts are in decimal; block systems label each point, and are there for transitive groups only.</summary>
internal sealed record SymPyAnswer(
    string Order, int[][] Orbits, string[] DerivedOrders, string CentreOrder, int[] AbelianInvariants, bool IsSolvable, bool IsNilpotent, int[][]? Joins, int[][]? MinimalSystems);
