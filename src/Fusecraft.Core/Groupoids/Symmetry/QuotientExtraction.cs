using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// Finds the vertex group at home from the quotient by symmetries. With <c>A(r)</c> the product of steps and voltages along a path from representative 0, the loops <c>A(r)·t·h·A(r')⁻¹</c> and
/// <c>A(r)·g·A(r)⁻¹</c>, <c>g</c> keeping <c>r</c>, generate an extension of the vertex group by the symmetries of the region. Beside the sites it acts on the symmetries themselves, by right
/// multiplication of their products; what fixes the identity there is the vertex group at representative 0, and home's is its image under the symmetry that leads there.
/// </summary>
internal static class QuotientExtraction
{
    public static PermutationGroup Run(OrbitExplorer explorer, QuotientRegions regions, CancellationToken cancellation) => explorer.Mechanism.SiteCount + explorer.Table.Count <= 256
        ? new QuotientExtraction<byte>(explorer, regions, cancellation).Run()
        : new QuotientExtraction<ushort>(explorer, regions, cancellation).Run();
}

/// <inheritdoc cref="QuotientExtraction"/>
internal sealed class QuotientExtraction<T>
    where T : unmanaged, IBinaryInteger<T>
{
    private readonly OrbitExplorer _explorer;
    private readonly QuotientRegions _regions;
    private readonly CancellationToken _cancellation;
    private readonly int _siteCount;
    private readonly int _degree;
    private readonly ChainBuilder<T> _builder;
    private readonly PackedPermutations<T> _steps;
    private readonly PackedPermutations<T> _symmetries;
    private readonly PackedPermutations<T> _labels;
    private readonly int[] _rowOf;
    private readonly T[] _loop;
    private readonly T[] _inverse;
    private readonly List<Permutation> _generators = [];

    public QuotientExtraction(OrbitExplorer explorer, QuotientRegions regions, CancellationToken cancellation)
    {
        _explorer = explorer;
        _regions = regions;
        _cancellation = cancellation;
        _siteCount = explorer.Mechanism.SiteCount;
        var table = explorer.Table;
        _degree = _siteCount + table.Count;
        _builder = new ChainBuilder<T>(_degree);
        _steps = new PackedPermutations<T>(_builder.Stride, Math.Max(1, explorer.Mechanism.Steps.Length));
        foreach (var step in explorer.Mechanism.Steps)
        {
            step.Permutation.CopyLanes(_steps.AddRow());
        }

        _symmetries = new PackedPermutations<T>(_builder.Stride, table.Count);
        for (var member = 0; member < table.Count; member++)
        {
            var images = Enumerable.Range(0, _degree)
                .Select(point => point < _siteCount ? table.Sites[member][point] : _siteCount + table.Product(point - _siteCount, member)).ToArray();
            Permutation.FromTrustedImages<int>(images).CopyLanes(_symmetries.AddRow());
        }

        _labels = new PackedPermutations<T>(_builder.Stride, 4);
        _rowOf = new int[explorer.Count];
        _loop = new T[_builder.Stride];
        _inverse = new T[_builder.Stride];
    }

    public PermutationGroup Run()
    {
        LabelTree();
        var (next, least, image) = (new ulong[_explorer.Mechanism.Board.Words], new ulong[_explorer.Mechanism.Board.Words], new ulong[_explorer.Mechanism.Board.Words]);
        for (var representative = 0; representative < _explorer.Count; representative++)
        {
            if (_regions.ComponentOf(representative) != 0)
            {
                continue;
            }

            _cancellation.ThrowIfCancellationRequested();
            if (_explorer.StabilizerOrder(representative) > 1)
            {
                foreach (var member in _explorer.Table.Stabilizer(_explorer.Key(representative).ToArray()))
                {
                    Lanes.ComposePadded<T>(Label(representative), _symmetries[member], _loop);
                    Close(representative);
                }
            }

            for (var step = 0; step < _explorer.Mechanism.Steps.Length; step++)
            {
                if (_explorer.Follow(representative, step, next, least, image) is { } arc && _regions.ComponentOf(arc.To) == 0)
                {
                    Lanes.ComposePadded<T>(Label(representative), _steps[step], _loop);
                    Lanes.ComposePadded<T>(_loop, _symmetries[arc.Voltage], _loop);
                    Close(arc.To);
                }
            }
        }

        _builder.Complete(_cancellation);
        var extension = PermutationGroup.FromChain([.. _generators], _builder.ToChain());
        var loops = extension.PointwiseStabilizer(_siteCount);
        var home = _explorer.Table.Sites[_explorer.Table.Inverse(_explorer.HomeVoltage)];
        ImmutableArray<Permutation> moved = [.. loops.Generators.Select(loop => Cut(loop).ConjugateBy(home))];
        return PermutationGroup.FromOrder(moved, _siteCount, loops.Order);
    }

    // A loop fixes the identity, so it moves no symmetry at all: only the sites are left.
    private Permutation Cut(Permutation loop) => Permutation.FromTrustedImages<int>([.. Enumerable.Range(0, _siteCount).Select(site => loop[site])]);

    private Span<T> Label(int representative) => _labels[_rowOf[representative]];

    // A shortest path to a representative of the home component never leaves it.
    private void LabelTree()
    {
        for (var representative = 0; representative < _explorer.Count; representative++)
        {
            if (_regions.ComponentOf(representative) != 0)
            {
                continue;
            }

            _rowOf[representative] = _labels.Count;
            if (representative == 0)
            {
                Lanes.Identity<T>(_loop);
            }
            else
            {
                Lanes.ComposePadded<T>(Label(_explorer.Parent(representative)), _steps[_explorer.ParentStep(representative)], _loop);
                Lanes.ComposePadded<T>(_loop, _symmetries[_explorer.ParentVoltage(representative)], _loop);
            }

            _labels.Add(_loop);
        }
    }

    // Ends the loop with the way back from a representative, and adds it unless it is known.
    private void Close(int representative)
    {
        Lanes.InvertPadded<T>(Label(representative), _inverse);
        Lanes.ComposePadded<T>(_loop, _inverse, _loop);
        if (!_builder.Contains(_loop))
        {
            _builder.Add(_loop, _cancellation);
            _generators.Add(Permutation.FromTrustedImages<T>(_loop.AsSpan(0, _degree)));
        }
    }
}
