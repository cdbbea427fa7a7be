using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// The permutations of the tree paths from a root to the shapes of its region, held inverted in one block of memory. Where all of them would take too much, only those at every k-th depth are
/// held and the others recomputed from the nearest one above.
/// </summary>
internal sealed class TreeLabels<T>
    where T : unmanaged, IBinaryInteger<T>
{
    private const long MaxBytes = 1L << 30;
    private readonly RegionTree _tree;
    private readonly PackedPermutations<T> _inverses;
    private readonly PackedPermutations<T> _inverseSteps;
    private readonly int[] _rowOf;
    private readonly T[] _recomputed;

    public TreeLabels(RegionTree tree, PackedPermutations<T> steps, long maxBytes = MaxBytes)
    {
        _tree = tree;
        _recomputed = new T[steps.Stride];
        _inverseSteps = new PackedPermutations<T>(steps.Stride, Math.Max(1, steps.Count));
        for (var step = 0; step < steps.Count; step++)
        {
            Lanes.InvertPadded<T>(steps[step], _inverseSteps.AddRow());
        }

        var bytesEach = steps.Stride * (long)System.Runtime.CompilerServices.Unsafe.SizeOf<T>();
        var every = (int)Math.Max(1, ((tree.Order.Length * bytesEach) + maxBytes - 1) / maxBytes);
        _rowOf = new int[tree.Order.Length == 0 ? 0 : tree.Order.Max() + 1];
        Array.Fill(_rowOf, -1);
        var depths = new int[_rowOf.Length];
        _inverses = new PackedPermutations<T>(steps.Stride, Math.Max(1, every == 1 ? tree.Order.Length : tree.Order.Length / every));
        foreach (var shape in tree.Order)
        {
            if (shape != tree.Root)
            {
                depths[shape] = depths[tree.Parent(shape)] + 1;
            }

            if (depths[shape] % every == 0)
            {
                Inverse(shape).CopyTo(_recomputed);
                _rowOf[shape] = _inverses.Count;
                _inverses.Add(_recomputed);
            }
        }
    }

    /// <summary>Writes the permutation of the path to a shape.</summary>
    public void Load(int shape, Span<T> label) => Lanes.InvertPadded<T>(Inverse(shape), label);

    /// <summary>The inverse of the permutation of the path to a shape; valid until the next call.</summary>
    public ReadOnlySpan<T> Inverse(int shape)
    {
        if (_rowOf[shape] >= 0)
        {
            return _inverses[_rowOf[shape]];
        }

        // τ(s)⁻¹ = t⁻¹ · τ(parent)⁻¹, so the steps gather from the last one upwards.
        Lanes.Identity<T>(_recomputed);
        while (true)
        {
            if (shape == _tree.Root)
            {
                return _recomputed;
            }

            Lanes.ComposePadded<T>(_recomputed, _inverseSteps[_tree.Step(shape)], _recomputed);
            shape = _tree.Parent(shape);
            if (_rowOf[shape] >= 0)
            {
                Lanes.ComposePadded<T>(_recomputed, _inverses[_rowOf[shape]], _recomputed);
                return _recomputed;
            }
        }
    }
}
