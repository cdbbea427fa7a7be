using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Mechanisms;

/// <summary>Definitions made by hand in C#.</summary>
public class MechanismDefinitionTests
{
    [Fact]
    public void Lists_left_at_their_type_default_are_empty()
    {
        var mechanism = Mechanism.Create(new MechanismDefinition
        {
            Name = "Plain",
            Sites = ["a", "b"],
            Pieces = default,
            Blocks = default,
            Marks = default,
            Turns = [new TurnDefinition { Name = "T", Moves = "(a b)", Carries = default, Guard = new GuardDefinition { Needs = default, BarredBy = default, AnyOf = default } }],
        });

        Assert.True(mechanism.Home.IsFree(mechanism.Turns[0].Forward));
    }

    [Fact]
    public void A_block_can_be_added_to_a_definition()
    {
        var cube = new MechanismDefinition { Name = "Cube", Family = new CubeFamily(3), Blocks = [["UFR", "UF"]] };

        Assert.Equal("[DBL DB] [UF UFR]", Mechanism.Create(cube.WithBlock("DB", "DBL")).Home.ToString());
        Assert.Equal("[UF UFR]", Mechanism.Create(cube).Home.ToString());
    }

    [Fact]
    public void Generators_become_turns_that_are_always_free()
    {
        var mechanism = Mechanism.FromGenerators("Pair", Permutation.Parse("(1 2 3)"), Permutation.Parse("(3 4)"));

        Assert.Equal(["g1", "g2"], mechanism.Turns.Select(turn => turn.Name));
        Assert.Equal(24, mechanism.UnguardedGroup.Order);
        Assert.Throws<ArgumentException>(() => Mechanism.FromGenerators("None", Permutation.Identity));
    }
}
