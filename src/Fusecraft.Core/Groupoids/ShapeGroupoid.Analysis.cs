using System.Collections.Immutable;
using System.Runtime.InteropServices;

namespace Fusecraft.Groupoids;

// What the shapes look like as a graph, over all regions.
public sealed partial class ShapeGroupoid
{
    private RegionMembers? _members;

    /// <summary>The shapes where exactly one turn has a free step, in either sense, ascending.</summary>
    /// <exception cref="InvalidOperationException">A budget ended the exploration, so the steps of some shapes are not known.</exception>
    /// <remarks>Tries every step at every shape.</remarks>
    public ImmutableArray<int> DeadEnds(CancellationToken cancellationToken = default) => ShapesWhere(turns => turns == 1, cancellationToken);

    /// <summary>The shapes where no step is free, ascending.</summary>
    /// <exception cref="InvalidOperationException">A budget ended the exploration.</exception>
    /// <remarks>Tries every step at every shape.</remarks>
    public ImmutableArray<int> StuckShapes(CancellationToken cancellationToken = default) => ShapesWhere(turns => turns == 0, cancellationToken);

    /// <summary>How many shapes have how many free steps: entry <c>k</c> counts those with <c>k</c>. The last entry is not 0.</summary>
    /// <exception cref="InvalidOperationException">A budget ended the exploration.</exception>
    /// <remarks>Tries every step at every shape.</remarks>
    public ImmutableArray<int> BranchingProfile(CancellationToken cancellationToken = default)
    {
        RequireComplete();
        var counts = new int[Mechanism.Steps.Length + 1];
        var most = 0;
        for (var shape = 0; shape < ShapeCount; shape++)
        {
            cancellationToken.ThrowIfCancellationRequested();
            var free = 0;
            for (var step = 0; step < Mechanism.Steps.Length; step++)
            {
                free += Target(shape, step) >= 0 ? 1 : 0;
            }

            counts[free]++;
            most = Math.Max(most, free);
        }

        return [.. counts[..(most + 1)]];
    }

    /// <summary>How many shapes are at which distance from the first: entry <c>d</c> counts those at distance <c>d</c>. Of those found, where a budget ended the exploration.</summary>
    public ImmutableArray<int> DepthProfile() => [.. Enumerable.Range(0, LevelStarts.Count - 1).Select(depth => LevelStarts[depth + 1] - LevelStarts[depth])];

    /// <summary>The free steps that leave their region, in the order of shapes and steps; there is no way back.</summary>
    /// <exception cref="InvalidOperationException">A budget ended the exploration.</exception>
    /// <remarks>Tries every step at every shape of a region with passages.</remarks>
    public ImmutableArray<Arrow> Passages(CancellationToken cancellationToken = default)
    {
        var passages = ImmutableArray.CreateBuilder<Arrow>();
        if (PassageCount > 0)
        {
            for (var shape = 0; shape < ShapeCount; shape++)
            {
                cancellationToken.ThrowIfCancellationRequested();
                var region = RegionOf(shape);
                for (var step = 0; step < Mechanism.Steps.Length && Regions[region].PassageCount > 0; step++)
                {
                    if (Target(shape, step) is >= 0 and var target && RegionOf(target) != region)
                    {
                        passages.Add(new Arrow(shape, Mechanism.Steps[step], target));
                    }
                }
            }
        }

        return passages.DrainToImmutable();
    }

    /// <summary>For each shape the smallest number of steps back to the first one; -1 where there is no way back, which is exactly outside the home region.</summary>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="InvalidOperationException">A budget ended the exploration.</exception>
    /// <remarks>Where every step can be undone this is the distance from the first shape. Else the arrows of the home region are written out and searched from their ends.</remarks>
    public ImmutableArray<int> DistancesBack(CancellationToken cancellationToken = default)
    {
        RequireComplete();
        var distances = new int[ShapeCount];
        if (Mechanism.IsReversible)
        {
            for (var depth = 0; depth < LevelStarts.Count - 1; depth++)
            {
                distances.AsSpan(LevelStarts[depth], LevelStarts[depth + 1] - LevelStarts[depth]).Fill(depth);
            }
        }
        else
        {
            Array.Fill(distances, -1);
            var home = GraphOf(0, null, cancellationToken);
            var back = home.DistancesTo(0);
            for (var i = 0; i < back.Length; i++)
            {
                distances[home.Shapes[i]] = back[i];
            }
        }

        return ImmutableCollectionsMarshal.AsImmutableArray(distances);
    }

    /// <summary>Writes out the arrows of a region, for questions about its graph.</summary>
    /// <param name="region">The number of the region; 0 for the home region.</param>
    /// <param name="progress">Told now and then how many of the region's shapes are done.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such region.</exception>
    /// <exception cref="InvalidOperationException">A budget ended the exploration, or the region has more than two thousand million arrows.</exception>
    /// <remarks>Takes 6 bytes an arrow and 8 bytes a shape; another 6 and 4 where some step cannot be undone.</remarks>
    public RegionGraph GraphOf(int region, IProgress<int>? progress = null, CancellationToken cancellationToken = default)
    {
        if ((uint)region >= (uint)Regions.Length)
        {
            throw new ArgumentOutOfRangeException(nameof(region), region, $"There are {Regions.Length} regions, numbered from 0.");
        }

        return new RegionGraph(this, Regions[region], Members, progress, cancellationToken);
    }

    private RegionMembers Members => LazyInitializer.EnsureInitialized(ref _members, () => new RegionMembers(this));

    private ImmutableArray<int> ShapesWhere(Func<int, bool> holdsForFreeTurns, CancellationToken cancellation)
    {
        RequireComplete();
        var shapes = ImmutableArray.CreateBuilder<int>();
        for (var shape = 0; shape < ShapeCount; shape++)
        {
            cancellation.ThrowIfCancellationRequested();
            var free = 0;
            foreach (var turn in Mechanism.Turns)
            {
                free += Target(shape, turn.Forward.Index) >= 0 || (turn.Backward is { } back && Target(shape, back.Index) >= 0) ? 1 : 0;
            }

            if (holdsForFreeTurns(free))
            {
                shapes.Add(shape);
            }
        }

        return shapes.DrainToImmutable();
    }

    private void RequireComplete()
    {
        if (!IsComplete)
        {
            throw new InvalidOperationException("A budget ended the exploration, so the steps of some shapes are not known; explore further.");
        }
    }
}
