using System.Globalization;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>A block system of a transitive group described: what the group does on the parts, and what those members that keep a part do on its points.</summary>
/// <remarks>Every statement is proven. Immutable, safe to share; what takes longer is found when first asked for.</remarks>
public sealed class BlockSystemPortrait
{
    private readonly Lazy<ActionPortrait> _onParts;
    private readonly Lazy<ActionPortrait> _inPart;
    private readonly PermutationGroup _group;

    internal BlockSystemPortrait(PermutationGroup group, BlockSystem system)
    {
        _group = group;
        System = system;
        _onParts = new(() => new ActionPortrait(group.ActionOn(system).Image));
        _inPart = new(() => new ActionPortrait(ActionInFirstPart()));
    }

    /// <summary>The parts, of points of the action described.</summary>
    public BlockSystem System { get; }

    /// <summary>The number of parts.</summary>
    public int PartCount => System.Parts.Length;

    /// <summary>The number of points in each part.</summary>
    public int PartSize => System.PartSize;

    /// <summary>How the group moves the parts.</summary>
    public ActionPortrait ActionOnParts => _onParts.Value;

    /// <summary>What the members that carry the first part to itself do on its points, renamed 0, 1, 2, … in ascending order. On the other parts it is the same but for names.</summary>
    public ActionPortrait ActionInPart => _inPart.Value;

    /// <summary>The number of members that carry every part to itself.</summary>
    public BigInteger KernelOrder => _group.Order / ActionOnParts.Group.Order;

    /// <summary>
    /// The group lies in the wreath product <see cref="ActionInPart"/> wr <see cref="ActionOnParts"/>: the index there. It is the wreath product when the index is 1.
    /// </summary>
    public BigInteger IndexInWreathProduct => BigInteger.Pow(ActionInPart.Group.Order, PartCount) * ActionOnParts.Group.Order / _group.Order;

    /// <summary>The wreath product that the group lies in, where both its groups have names; else null.</summary>
    internal string? WreathProductName => ActionInPart.Name is { } lower && ActionOnParts.Name is { } upper ? $"{Enclosed(lower)} wr {Enclosed(upper)}" : null;

    /// <summary>One line, such as <c>8 parts of 3: C3 in each, Sym(8) on them, kernel of order 3^7, index 3 in C3 wr Sym(8)</c>.</summary>
    public override string ToString() => string.Create(CultureInfo.InvariantCulture,
        $"{PartCount} parts of {PartSize}: {Told(ActionInPart)} in each, {Told(ActionOnParts)} on them, kernel of order {FactoredInteger.FromSmooth(KernelOrder, _group.Degree)}, {Place()}");

    private string Place() => (IndexInWreathProduct.IsOne ? "all of " : $"index {FactoredInteger.FromSmooth(IndexInWreathProduct, _group.Degree)} in ") + (WreathProductName ?? "the wreath product");

    private static string Told(ActionPortrait action) => action.Name ?? $"order {action.Order}";

    private static string Enclosed(string name) => name.Contains(' ', StringComparison.Ordinal) || name.Contains(':', StringComparison.Ordinal) ? $"({name})" : name;

    // Schreier generators of the subgroup that keeps the first part.
    private PermutationGroup ActionInFirstPart()
    {
        var carriers = new Permutation?[PartCount];
        carriers[0] = Permutation.Identity;
        var queue = new Queue<int>([0]);
        var generators = new List<Permutation>();
        var found = PermutationGroup.Generate(generators, PartSize);
        var toPart = new List<(Permutation Carrier, int Target)>();
        while (queue.TryDequeue(out var part))
        {
            foreach (var generator in _group.Generators)
            {
                var carried = carriers[part]!.Value * generator;
                var target = System.PartOf(carried[System.Parts[0][0]]);
                if (carriers[target] is null)
                {
                    carriers[target] = carried;
                    queue.Enqueue(target);
                }
                else
                {
                    toPart.Add((carried, target));
                }
            }
        }

        var first = System.Parts[0];
        foreach (var (carrier, target) in toPart)
        {
            var back = carriers[target]!.Value.Inverse();
            var inPart = Permutation.FromTrustedImages<int>([.. first.Select(point => first.IndexOf(back[carrier[point]]))]);
            if (!found.Contains(inPart))
            {
                generators.Add(inPart);
                found = PermutationGroup.Generate(generators, PartSize);
            }
        }

        return found;
    }
}
