using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>The sliding board: tiles on a rectangle of cells slide into a neighbouring gap. Sites are the cells, row by row from the top left.</summary>
/// <remarks>
/// For each pair of neighbouring cells <c>a</c>, <c>b</c> (<c>a</c> left of or above <c>b</c>) there is one turn <c>a:b</c>, the exchange of the two, free when one of them is a gap and the
/// other is not. Steps are written <c>L R U D</c> by the way the tile moves; with several gaps followed by <c>.</c> and the tile's cell before the step.
/// </remarks>
public sealed partial class BoardFamily : MechanismFamily
{
    /// <summary>Describes a board.</summary>
    /// <param name="columns">Cells a row, at least 1; checked when the mechanism is made.</param>
    /// <param name="rows">Rows, at least 1.</param>
    /// <param name="gaps">The names (1-based numbers) of the cells that are gaps at home; empty for the last cell.</param>
    public BoardFamily(int columns, int rows, params ImmutableArray<string> gaps)
    {
        Columns = columns;
        Rows = rows;
        Gaps = gaps.IsDefault ? [] : gaps;
    }

    /// <inheritdoc/>
    public override string Kind => "board";

    /// <summary>Cells a row.</summary>
    public int Columns { get; }

    /// <summary>Rows.</summary>
    public int Rows { get; }

    /// <summary>The cells that are gaps at home, as given; empty for the last cell.</summary>
    public ImmutableArray<string> Gaps { get; }
}
