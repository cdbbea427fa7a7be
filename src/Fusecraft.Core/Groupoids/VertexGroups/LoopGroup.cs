using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>The group that loops make as they come, and the fastest way to ask it for members.</summary>
internal abstract class LoopGroup
{
    public static LoopGroup Create(Mechanism mechanism, CancellationToken cancellation) =>
        mechanism.SiteCount <= 256 ? new LoopGroup<byte>(mechanism, cancellation) : new LoopGroup<ushort>(mechanism, cancellation);

    /// <summary>Memory that <see cref="Contains(ReadOnlySpan{byte}, object)"/> may use, for one thread.</summary>
    public abstract object NewScratch();

    /// <summary>True when the group holds the permutation of a row. A false answer holds only after <see cref="Complete"/>.</summary>
    public abstract bool Contains(ReadOnlySpan<byte> row);

    /// <summary>The same for several threads at once, each with memory of its own, while nothing is added.</summary>
    public abstract bool Contains(ReadOnlySpan<byte> row, object scratch);

    /// <summary>Adds a generator that the group does not hold.</summary>
    public abstract void Add(ReadOnlySpan<byte> row);

    /// <summary>Makes the chain proven.</summary>
    /// <param name="isForMany">True when so many questions are to come that a faster way to answer them is worth looking for.</param>
    public abstract void Complete(bool isForMany);

    /// <summary>The group with its proven chain; nothing can be added any more.</summary>
    public abstract PermutationGroup ToGroup();
}

/// <inheritdoc cref="LoopGroup"/>
internal sealed class LoopGroup<T> : LoopGroup
    where T : unmanaged, IBinaryInteger<T>
{
    private readonly CancellationToken _cancellation;
    private readonly SiteRows _rows;
    private readonly ChainBuilder<T> _builder;
    private readonly List<Permutation> _generators = [];
    private readonly List<byte> _generatorRows = [];
    private readonly Scratch _own;
    private WindowMembership? _membership;

    public LoopGroup(Mechanism mechanism, CancellationToken cancellation)
    {
        _cancellation = cancellation;
        _rows = mechanism.SiteRows;
        _builder = new ChainBuilder<T>(mechanism.SiteCount);
        _own = new Scratch(mechanism.SiteCount, _builder.Stride);
    }

    public override object NewScratch() => new Scratch(_builder.Degree, _builder.Stride);

    public override bool Contains(ReadOnlySpan<byte> row) => Contains(row, _own);

    public override bool Contains(ReadOnlySpan<byte> row, object scratch)
    {
        var own = (Scratch)scratch;
        if (_membership is not null)
        {
            return _membership.Contains(row);
        }

        Load(row, own);
        return _builder.ContainsInPlace(own.Lanes);
    }

    public override void Add(ReadOnlySpan<byte> row)
    {
        _membership = null;
        Load(row, _own);
        _generators.Add(Permutation.FromTrustedImages<T>(_own.Lanes));
        _generatorRows.AddRange(row);
        _builder.Add(_own.Lanes, _cancellation);
    }

    public override void Complete(bool isForMany)
    {
        _builder.Complete(_cancellation);
        if (isForMany && _rows is WindowRows windows)
        {
            _membership = WindowMembership.TryCreate(windows, [.. _generatorRows], _builder.Order, _cancellation);
        }
    }

    public override PermutationGroup ToGroup() => PermutationGroup.FromChain([.. _generators], _builder.ToChain());

    private void Load(ReadOnlySpan<byte> row, Scratch scratch)
    {
        _rows.CopyImages(row, scratch.Images);
        for (var site = 0; site < scratch.Lanes.Length; site++)
        {
            scratch.Lanes[site] = T.CreateTruncating(site < scratch.Images.Length ? scratch.Images[site] : site);
        }
    }

    private sealed class Scratch(int sites, int stride)
    {
        public int[] Images { get; } = new int[sites];

        public T[] Lanes { get; } = new T[stride];
    }
}
