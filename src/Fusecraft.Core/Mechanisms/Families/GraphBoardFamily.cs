using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>The sliding board on a graph: tiles on its vertices slide along its edges into a gap. Sites are the vertices.</summary>
/// <remarks>The turns are <c>e1</c>, <c>e2</c>, … in the order of the edges, each the exchange of the two ends, free when one of them is a gap and the other is not.</remarks>
public sealed partial class GraphBoardFamily : MechanismFamily
{
    /// <summary>Describes a graph board.</summary>
    /// <param name="vertices">The names of the vertices, in the order of their numbers.</param>
    /// <param name="edges">Pairs of vertex names.</param>
    /// <param name="gaps">The vertices that are gaps at home; empty for the last vertex.</param>
    public GraphBoardFamily(ImmutableArray<string> vertices, ImmutableArray<(string From, string To)> edges, params ImmutableArray<string> gaps)
    {
        Vertices = vertices.IsDefault ? [] : vertices;
        Edges = edges.IsDefault ? [] : edges;
        Gaps = gaps.IsDefault ? [] : gaps;
    }

    /// <inheritdoc/>
    public override string Kind => "graph-board";

    /// <summary>The names of the vertices.</summary>
    public ImmutableArray<string> Vertices { get; }

    /// <summary>The edges, as pairs of vertex names.</summary>
    public ImmutableArray<(string From, string To)> Edges { get; }

    /// <summary>The vertices that are gaps at home, as given; empty for the last vertex.</summary>
    public ImmutableArray<string> Gaps { get; }
}
