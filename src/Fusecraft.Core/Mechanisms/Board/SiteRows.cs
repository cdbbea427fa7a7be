using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>How permutations that the steps of a mechanism generate are held as rows of bytes, for millions of them: as few bytes as tell them apart, and fast to multiply.</summary>
internal abstract class SiteRows
{
    protected SiteRows(Mechanism mechanism) => Mechanism = mechanism;

    /// <summary>Bytes a row.</summary>
    public abstract int Pitch { get; }

    protected Mechanism Mechanism { get; }

    public static SiteRows Of(Mechanism mechanism) =>
        WindowRows.TryCreate(mechanism) ?? (mechanism.SiteCount <= 256 ? new PlainRows<byte>(mechanism) : (SiteRows)new PlainRows<ushort>(mechanism));

    /// <summary>First one, then the other. The result overlaps neither.</summary>
    public abstract void Compose(ReadOnlySpan<byte> first, ReadOnlySpan<byte> second, Span<byte> result);

    /// <summary>The result does not overlap the row.</summary>
    public abstract void Invert(ReadOnlySpan<byte> row, Span<byte> result);

    /// <summary>Writes the row of a permutation that the steps generate.</summary>
    public abstract void Load(Permutation permutation, Span<byte> row);

    /// <summary>Writes where all sites go.</summary>
    public abstract void CopyImages(ReadOnlySpan<byte> row, Span<int> images);

    /// <summary>The rows of all steps, one after the other.</summary>
    public byte[] LoadSteps()
    {
        var rows = new byte[Mechanism.Steps.Length * Pitch];
        for (var step = 0; step < Mechanism.Steps.Length; step++)
        {
            Load(Mechanism.Steps[step].Permutation, rows.AsSpan(step * Pitch, Pitch));
        }

        return rows;
    }
}
