namespace Fusecraft.Groupoids;

/// <summary>How alike two mechanisms are.</summary>
public enum ComparisonVerdict
{
    /// <summary>One puzzle: the home of the first, moved by a symmetry and perhaps held by another corner, is a shape of the home region of the second.</summary>
    SamePuzzle,

    /// <summary>Not one puzzle in that sense, but their shape graphs are alike: some renaming of turns carries one to the other.</summary>
    SameShapeGraph,

    /// <summary>Not one puzzle, and no such renaming is known.</summary>
    Different,

    /// <summary>A budget ended the work before it was known whether they are one puzzle.</summary>
    Undecided,
}
