using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>
/// The permutations of the tree paths from a root to the shapes of its region, held inverted as rows. Where all of them would take too much memory, only those at every k-th depth are held and the others
/// recomputed from the nearest one above. Reading is safe from several threads.
/// </summary>
internal sealed class TreeLabels
{
    private const long MostBytes = 5L << 29;
    private readonly RegionTree _tree;
    private readonly SiteRows _rows;
    private readonly byte[] _inverseSteps;
    private readonly Column<byte> _inverses;

    // For each shape the row held for it, or -1; null where every shape of the tree has the row of its own number.
    private readonly int[]? _rowOf;
    private readonly int _held;

    public TreeLabels(RegionTree tree, SiteRows rows, byte[] steps, long mostBytes = MostBytes)
    {
        _tree = tree;
        _rows = rows;
        _inverseSteps = new byte[steps.Length];
        for (var at = 0; at < steps.Length; at += rows.Pitch)
        {
            rows.Invert(steps.AsSpan(at, rows.Pitch), _inverseSteps.AsSpan(at, rows.Pitch));
        }

        _inverses = new Column<byte>(rows.Pitch);
        var every = (int)Math.Max(1, ((tree.Order.Length * (long)rows.Pitch) + mostBytes - 1) / mostBytes);
        if (every == 1 && tree.IsInOrder)
        {
            HoldAll();
            _held = tree.Order.Length;
        }
        else
        {
            (_rowOf, _held) = HoldSome(every);
        }
    }

    /// <summary>Tells the memory that the row of a shape, in the tree or not, will be asked for.</summary>
    public void Announce(int shape)
    {
        var row = _rowOf is null ? shape : shape < _rowOf.Length ? _rowOf[shape] : -1;
        if (row >= 0 && row < _held)
        {
            Memory.Announce(ref _inverses.At(row), _rows.Pitch);
        }
    }

    /// <summary>The inverse of the permutation of the path to a shape; where it is not held it is written into the memory given.</summary>
    /// <param name="shape">A shape of the tree.</param>
    /// <param name="row">As long as a row.</param>
    /// <param name="scratch">As long as a row.</param>
    public ReadOnlySpan<byte> Inverse(int shape, Span<byte> row, Span<byte> scratch)
    {
        if (_rowOf is null)
        {
            return _inverses.Entry(shape);
        }

        Load(shape, row, scratch, _rowOf);
        return row;
    }

    private void HoldAll()
    {
        var count = _tree.Order.Length;
        _inverses.EnsureCapacity(count);
        LoadIdentity(_inverses.Entry(0));
        for (var shape = 1; shape < count; shape++)
        {
            _rows.Compose(InverseStep(shape), _inverses.Entry(_tree.Parent(shape)), _inverses.Entry(shape));
        }
    }

    private (int[] RowOf, int Held) HoldSome(int every)
    {
        var rowOf = new int[_tree.Order.Max() + 1];
        Array.Fill(rowOf, -1);
        var depths = new int[rowOf.Length];
        var (row, scratch, count) = (new byte[_rows.Pitch], new byte[_rows.Pitch], 0);
        foreach (var shape in _tree.Order)
        {
            depths[shape] = shape == _tree.Root ? 0 : depths[_tree.Parent(shape)] + 1;
            if (depths[shape] % every == 0)
            {
                Load(shape, row, scratch, rowOf);
                _inverses.EnsureCapacity(count + 1);
                row.CopyTo(_inverses.Entry(count));
                rowOf[shape] = count++;
            }
        }

        return (rowOf, count);
    }

    // τ(s)⁻¹ = t⁻¹ · τ(parent)⁻¹, so the steps gather from the last one upwards.
    private void Load(int shape, Span<byte> row, Span<byte> scratch, int[] rowOf)
    {
        if (rowOf[shape] >= 0)
        {
            _inverses.Entry(rowOf[shape]).CopyTo(row);
            return;
        }

        if (shape == _tree.Root)
        {
            LoadIdentity(row);
            return;
        }

        InverseStep(shape).CopyTo(row);
        for (shape = _tree.Parent(shape); rowOf[shape] < 0 && shape != _tree.Root; shape = _tree.Parent(shape))
        {
            _rows.Compose(row, InverseStep(shape), scratch);
            scratch.CopyTo(row);
        }

        if (rowOf[shape] >= 0)
        {
            _rows.Compose(row, _inverses.Entry(rowOf[shape]), scratch);
            scratch.CopyTo(row);
        }
    }

    private Span<byte> InverseStep(int shape) => _inverseSteps.AsSpan(_tree.Step(shape) * _rows.Pitch, _rows.Pitch);

    private void LoadIdentity(Span<byte> row) => _rows.Load(default, row);
}
