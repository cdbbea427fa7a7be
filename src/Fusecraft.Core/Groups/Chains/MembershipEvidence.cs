using System.Collections.Immutable;
using System.Globalization;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>Whether a permutation belongs to a group and, where it does not, something that anyone can check and that shows it.</summary>
/// <remarks>Points and levels are 0-based here, 1-based in <see cref="ToString"/>. Immutable, safe to share.</remarks>
public sealed class MembershipEvidence
{
    private MembershipEvidence(MembershipEvidenceKind kind, int? level, int? point, int? image, ImmutableArray<int> orbit, Permutation residue)
    {
        Kind = kind;
        Level = level;
        Point = point;
        Image = image;
        Orbit = orbit;
        Residue = residue;
    }

    /// <summary>What the evidence consists of.</summary>
    public MembershipEvidenceKind Kind { get; }

    /// <summary>True when the permutation is a member.</summary>
    public bool IsMember => Kind == MembershipEvidenceKind.Member;

    /// <summary>The level of the group's chain where sifting stopped (the number of levels for <see cref="MembershipEvidenceKind.LeavesResidue"/>); null for the other kinds.</summary>
    public int? Level { get; }

    /// <summary>The point that leaves its orbit: any point, or the base point of <see cref="Level"/>. Null for a member or a residue.</summary>
    public int? Point { get; }

    /// <summary>Where <see cref="Point"/> is taken: by the permutation, or by <see cref="Residue"/> where there is a <see cref="Level"/>.</summary>
    public int? Image { get; }

    /// <summary>The orbit of <see cref="Point"/>, ascending, which does not hold <see cref="Image"/>: under the group, or under the members that fix the base points before <see cref="Level"/>. Empty where there is no point.</summary>
    public ImmutableArray<int> Orbit { get; }

    /// <summary>
    /// What sifting left: the permutation times a member, fixing the base points before <see cref="Level"/>. The permutation is a member exactly when this is one. The identity for a member, and for
    /// <see cref="MembershipEvidenceKind.LeavesOrbit"/>, where nothing was sifted.
    /// </summary>
    public Permutation Residue { get; }

    internal static MembershipEvidence Member { get; } = new(MembershipEvidenceKind.Member, null, null, null, [], default);

    /// <summary>A sentence for people; points and levels are numbered from 1.</summary>
    public override string ToString() => Kind switch
    {
        MembershipEvidenceKind.Member => "It is a member.",
        MembershipEvidenceKind.LeavesOrbit => string.Create(CultureInfo.InvariantCulture,
            $"It is no member: it takes point {Point + 1} to {Image + 1}, which is not in the orbit of {Point + 1}."),
        MembershipEvidenceKind.LeavesLevel => string.Create(CultureInfo.InvariantCulture,
            $"It is no member: at level {Level + 1} of the stabilizer chain base point {Point + 1} would have to go to {Image + 1}, which is not in its orbit there."),
        _ => string.Create(CultureInfo.InvariantCulture,
            $"It is no member: beyond the last of {Level} levels of the stabilizer chain {Residue} is left, which fixes all base points."),
    };

    internal static MembershipEvidence LeavesOrbit(int point, int image, ImmutableArray<int> orbit) =>
        new(MembershipEvidenceKind.LeavesOrbit, null, point, image, orbit, default);

    internal static MembershipEvidence LeavesLevel(int level, int point, Permutation residue, ImmutableArray<int> orbit) =>
        new(MembershipEvidenceKind.LeavesLevel, level, point, residue[point], orbit, residue);

    internal static MembershipEvidence LeavesResidue(int levels, Permutation residue) =>
        new(MembershipEvidenceKind.LeavesResidue, levels, null, null, [], residue);
}
