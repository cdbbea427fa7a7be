using System.Collections.Immutable;
using System.Numerics;
using System.Text;

namespace Fusecraft.Mechanisms;

/// <summary>Where all marks and blocks are, labels ignored. What bars a step depends on the shape alone.</summary>
/// <remarks>Value equality within one mechanism. Equal fusings are equal shapes however they were written down. Immutable, safe to share.</remarks>
public sealed class Shape : IEquatable<Shape>
{
    private readonly ulong[] _key;

    internal Shape(Mechanism mechanism, ReadOnlySpan<ulong> key)
    {
        Mechanism = mechanism;
        _key = key.ToArray();
    }

    /// <summary>The mechanism whose shape this is.</summary>
    public Mechanism Mechanism { get; }

    /// <summary>The blocks, each as ascending piece numbers, in the order of their first pieces.</summary>
    public ImmutableArray<ImmutableArray<int>> Blocks => Mechanism.Board.BlocksOf(_key);

    /// <summary>The marks with the sites they sit on.</summary>
    public ImmutableArray<(string Mark, int Site)> Marks => Mechanism.Board.MarksOf(_key);

    internal ReadOnlySpan<ulong> Key => _key;

    /// <summary>True when the two shapes belong to the same mechanism and have the same blocks and marks.</summary>
    public static bool operator ==(Shape? left, Shape? right) => left is null ? right is null : left.Equals(right);

    /// <summary>True when the two shapes differ.</summary>
    public static bool operator !=(Shape? left, Shape? right) => !(left == right);

    /// <summary>True when the step can be done in this shape.</summary>
    /// <exception cref="ArgumentException">The step belongs to another mechanism.</exception>
    public bool IsFree(Step step) => Mechanism.Board.Of(step).IsFree(_key);

    /// <summary>The shape after a step, or null when the step is barred.</summary>
    /// <exception cref="ArgumentException">The step belongs to another mechanism.</exception>
    public Shape? After(Step step)
    {
        var moves = Mechanism.Board.Of(step);
        if (!moves.IsFree(_key))
        {
            return null;
        }

        var next = new ulong[_key.Length];
        moves.Move(_key, next);
        return new Shape(Mechanism, next);
    }

    /// <summary>What bars the step in this shape, or null when it is free.</summary>
    /// <exception cref="ArgumentException">The step belongs to another mechanism.</exception>
    public Barrier? WhyBarred(Step step) => IsFree(step) ? null : Barrier.Of(this, step);

    /// <summary>The steps that are free in this shape, in the order of their numbers.</summary>
    public ImmutableArray<Step> FreeSteps() => [.. Mechanism.Steps.Where(IsFree)];

    /// <inheritdoc/>
    public bool Equals(Shape? other) => other is not null && ReferenceEquals(Mechanism, other.Mechanism) && Key.SequenceEqual(other.Key);

    /// <inheritdoc/>
    public override bool Equals(object? obj) => Equals(obj as Shape);

    /// <inheritdoc/>
    public override int GetHashCode()
    {
        var hash = default(HashCode);
        foreach (var word in _key)
        {
            hash.Add(word);
        }

        return hash.ToHashCode();
    }

    /// <summary>Blocks in brackets, then marks, such as <c>[UF UFR] [DL DBL] pin@3</c>; <c>plain</c> where there is neither.</summary>
    public override string ToString()
    {
        var text = new StringBuilder();
        foreach (var block in Blocks)
        {
            text.Append('[').AppendJoin(' ', block.Select(piece => Mechanism.PieceNames[piece])).Append("] ");
        }

        foreach (var (mark, site) in Marks)
        {
            text.Append(mark).Append('@').Append(Mechanism.SiteNames[site]).Append(' ');
        }

        return text.Length == 0 ? "plain" : text.ToString(0, text.Length - 1);
    }
}
