namespace Fusecraft.Groups;

/// <summary>What shows whether a permutation belongs to a group.</summary>
public enum MembershipEvidenceKind
{
    /// <summary>It is a member: it sifts to the identity.</summary>
    Member,

    /// <summary>No member: it takes a point out of its orbit under the group.</summary>
    LeavesOrbit,

    /// <summary>No member: multiplied by a member it fixes the base points before some level and takes that level's base point out of its orbit there.</summary>
    LeavesLevel,

    /// <summary>No member: multiplied by a member it fixes every base point and yet is not the identity.</summary>
    LeavesResidue,
}
