using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>A place for one token: a bond between pieces <c>A</c> &lt; <c>B</c>, or a mark on site <c>A</c>.</summary>
internal readonly record struct Slot(string? Mark, int A, int B)
{
    public static Slot OfBond(int a, int b) => new(null, Math.Min(a, b), Math.Max(a, b));

    public static Slot OfMark(string mark, int site) => new(mark, site, -1);

    public static implicit operator Slot((string Mark, int Site) mark) => OfMark(mark.Mark, mark.Site);

    public Slot Moved(Permutation sites, int[] pieces) => Mark is null ? OfBond(pieces[A], pieces[B]) : OfMark(Mark, sites[A]);
}
