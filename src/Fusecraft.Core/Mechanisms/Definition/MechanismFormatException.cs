using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>A mechanism file or definition has mistakes; all of them are listed.</summary>
public sealed class MechanismFormatException : FormatException
{
    /// <summary>Makes the exception from the problems found.</summary>
    /// <param name="problems">At least one problem.</param>
    public MechanismFormatException(IEnumerable<MechanismProblem> problems)
        : this([.. problems])
    {
    }

    private MechanismFormatException(ImmutableArray<MechanismProblem> problems)
        : base(string.Join(Environment.NewLine, problems)) => Problems = problems;

    /// <summary>All problems, in the order of the file.</summary>
    public ImmutableArray<MechanismProblem> Problems { get; }
}
