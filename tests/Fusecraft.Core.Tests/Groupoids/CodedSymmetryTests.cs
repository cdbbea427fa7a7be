using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Tests.Groupoids;

/// <summary>Guards written in code cannot be seen to keep a symmetry, so none is claimed.</summary>
public class CodedSymmetryTests
{
    [Fact]
    public void A_guard_in_code_leaves_no_symmetry()
    {
        var mechanism = Twins();

        Assert.Equal(1, SymmetryGroup.Of(mechanism).Order);
        Assert.Equal(ShapeGroupoid.Explore(mechanism).ShapeCount, ShapeOrbits.Explore(mechanism).ShapeCount);
    }

    [Fact]
    public void Whether_guards_in_code_say_the_same_is_left_undecided()
    {
        var mechanism = Twins();

        Assert.Equal(ComparisonVerdict.SamePuzzle, MechanismComparison.Of(mechanism, mechanism).Verdict);
        Assert.Equal(ComparisonVerdict.Undecided, MechanismComparison.Of(mechanism, Twins()).Verdict);
    }

    private static Mechanism Twins() => MechanismBuilder.Custom("Twins", 6)
        .Turn("Left", "(1 2 3)", turn => turn.When(shape => shape.Marks.Any(mark => mark.Site < 3))).Turn("Right", "(4 5 6)").Turn("Across", "(1 4)")
        .Mark("pin", "1").Build();
}
