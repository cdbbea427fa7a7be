using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groupoids;

public class SymmetryGroupTests
{
    // The cube has 24 rotations and 48 symmetries in all; the corner held by even sizes leaves 6, the symmetries of a triangle.
    [Theory]
    [InlineData(2, "", 6)]
    [InlineData(3, "", 48)]
    [InlineData(4, "", 6)]
    [InlineData(5, "", 48)]
    [InlineData(3, "U D", 16)]
    [InlineData(3, "U R", 4)]
    [InlineData(3, "U R F", 6)]
    [InlineData(3, "U R2", 2)]
    [InlineData(3, "U", 8)]
    [InlineData(5, "U Dw", 8)]
    public void A_cube_has_the_symmetries_that_keep_its_turns(int size, string use, int count)
    {
        var group = SymmetryGroup.Of(Make.Cube(size, use));

        Assert.Equal(count, group.Order);
        Assert.Equal(count, group.Members().Select(member => member.Sites).Distinct().Count());
    }

    [Fact]
    public void A_cube_whose_face_centres_twist_keeps_its_symmetries() =>
        Assert.Equal(48, SymmetryGroup.Of(Mechanism.Create(new MechanismDefinition { Name = "twist", Family = new CubeFamily(3, centreTwist: true) })).Order);

    [Theory]
    [InlineData(3, 3, 8)]
    [InlineData(4, 3, 4)]
    [InlineData(5, 1, 2)]
    [InlineData(1, 1, 1)]
    public void A_board_has_the_symmetries_of_its_rectangle(int columns, int rows, int count)
    {
        var board = Make.Board(columns, rows);
        Assert.Equal(count, SymmetryGroup.Of(board).Order);
        Assert.Equal(count, SymmetryGroup.Find(board).Order);
    }

    // Orders of automorphism groups of graphs: textbook facts (Petersen 120, cube 48, K5 5! and K33 2·3!²); source not opened, values from memory.
    [Theory]
    [InlineData("petersen", 120)]
    [InlineData("cube", 48)]
    [InlineData("K5", 120)]
    [InlineData("K33", 72)]
    [InlineData("path5", 2)]
    public void A_graph_board_has_the_automorphisms_of_its_graph(string graph, int count)
    {
        (int Vertices, (int, int)[] Edges) made = graph switch
        {
            "petersen" => (10, [.. Enumerable.Range(0, 5).SelectMany(i => ((int, int)[])[(i + 1, ((i + 1) % 5) + 1), (i + 1, i + 6), (i + 6, ((i + 2) % 5) + 6)])]),
            "cube" => (8, [.. from a in Enumerable.Range(0, 8) from bit in (int[])[1, 2, 4] where (a & bit) == 0 select (a + 1, (a | bit) + 1)]),
            "K5" => (5, [.. from a in Enumerable.Range(1, 5) from b in Enumerable.Range(1, a - 1) select (b, a)]),
            "K33" => (6, [.. from a in Enumerable.Range(1, 3) from b in Enumerable.Range(4, 3) select (a, b)]),
            _ => (5, [(1, 2), (2, 3), (3, 4), (4, 5)]),
        };

        Assert.Equal(count, SymmetryGroup.Of(Make.GraphBoard(made.Vertices, made.Edges, 1)).Order);
    }

    [Theory]
    [InlineData(2, "")]
    [InlineData(3, "")]
    [InlineData(3, "U R F2")]
    [InlineData(4, "U Uw R")]
    public void What_is_found_from_the_steps_holds_what_the_family_supplies(int size, string use)
    {
        var cube = Make.Cube(size, use);
        Assert.True(SymmetryGroup.Of(cube).Sites.IsSubgroupOf(SymmetryGroup.Find(cube).Sites));
    }

    // Elementary: orbit and stabilizer of the gap on a 3x3 board, whose square has eight symmetries.
    [Theory]
    [InlineData("5", 8)]
    [InlineData("1", 2)]
    [InlineData("2", 2)]
    public void The_symmetries_that_fix_a_shape_are_those_that_fix_its_gap(string gap, int count)
    {
        var board = Make.Board(3, 3);
        var groupoid = ShapeGroupoid.Explore(board);
        var shape = Enumerable.Range(0, 9).Select(groupoid.ShapeAt).Single(shape => board.SiteNames[shape.Marks.Single().Site] == gap);
        var fixing = SymmetryGroup.Of(board).Fixing(shape);

        Assert.Equal(count, fixing.Order);
        Assert.All(fixing.Members(), member => Assert.Equal(shape, member.Image(shape)));
        Assert.Throws<ArgumentException>("kept", () => fixing.Fixing(Make.Board(3, 3).Home));
    }

    [Fact]
    public void Symmetries_take_arrows_to_arrows()
    {
        for (var seed = 1UL; seed <= 400; seed++)
        {
            var mechanism = seed % 4 == 0 ? RandomFusings.From(seed, 2 + (int)(seed / 4 % 3)) : Mechanism.Create(RandomMechanisms.From(seed));
            foreach (var symmetry in SymmetryGroup.Of(mechanism).Generators)
            {
                Assert.All(mechanism.Steps, step => Assert.Equal(symmetry.Image(step).Permutation, step.Permutation.ConjugateBy(symmetry.Sites)));
                var shape = mechanism.Home;
                foreach (var step in mechanism.Steps.Concat(mechanism.Steps))
                {
                    if (symmetry.Image(shape) is { } image)
                    {
                        Assert.Equal(shape.After(step) is { } after ? symmetry.Image(after) : null, image.After(symmetry.Image(step)));
                    }

                    shape = shape.After(step) ?? shape;
                }
            }
        }
    }

    [Fact]
    public void All_symmetries_of_random_mechanisms_are_found()
    {
        var symmetric = 0;
        for (var seed = 1UL; seed <= 600; seed++)
        {
            var definition = RandomMechanisms.From(seed);
            if (definition.Sites.Length > 5)
            {
                continue;
            }

            var mechanism = Mechanism.Create(definition);
            var found = SymmetryGroup.Find(mechanism).Members().Select(member => member.Sites).ToHashSet();
            var bruteForce = new BruteSymmetries(definition);
            var brute = bruteForce.All();

            // What nothing moves, reads or holds is exchanged by no symmetry that is found, and by many that brute force finds.
            brute.RemoveWhere(sites => sites.Support.Any(bruteForce.IsIdle));
            Assert.True(brute.SetEquals(found), $"seed {seed}: {found.Count} found, {brute.Count} there");
            symmetric += brute.Count > 1 ? 1 : 0;
        }

        Assert.True(symmetric > 30, $"only {symmetric} of them have a symmetry");
    }

    [Fact]
    public void Guards_that_say_the_same_are_the_same()
    {
        // Left is free with a pin at 1 or without one at 2; Right says it of 4 and 3, by three overlapping alternatives. Each can also be turned round, for the backward step reads the places exchanged.
        var mechanism = MechanismBuilder.Custom("Twins", 4)
            .Turn("Left", "(1 2)", turn => turn.AnyOf(a => a.Needs("pin@1"), b => b.BarredBy("pin@2")))
            .Turn("Right", "(4 3)", turn => turn.AnyOf(a => a.Needs("pin@4", "pin@3"), b => b.BarredBy("pin@3"), c => c.Needs("pin@4").BarredBy("pin@3")))
            .Mark("pin", "1").Build();

        Assert.Equal(8, SymmetryGroup.Find(mechanism).Order);
    }

    [Fact]
    public void The_symmetries_that_fix_home_keep_its_blocks_and_marks()
    {
        Assert.Equal(2, SymmetryGroup.Of(Make.Cube(3, "", "UFR UF")).FixingHome().Order);
        Assert.Equal(1, SymmetryGroup.Of(Make.Cube(3, "", "UFR UF FR")).FixingHome().Order / 2);
        Assert.Equal(2, SymmetryGroup.Of(Make.Cube(3, "", "UF U")).FixingHome().Order);
        Assert.Equal(48, SymmetryGroup.Of(Make.Cube(3)).FixingHome().Order);
        Assert.Equal(2, SymmetryGroup.Of(Make.Board(3, 3)).FixingHome().Order);
    }

    [Fact]
    public void Fixing_home_is_what_members_say()
    {
        for (var seed = 1UL; seed <= 60; seed++)
        {
            var mechanism = seed % 2 == 0 ? RandomFusings.From(seed, 3) : Mechanism.Create(RandomMechanisms.From(seed));
            var group = SymmetryGroup.Of(mechanism);
            var fixing = group.FixingHome();

            Assert.Equal(group.Members().Count(member => member.Image(mechanism.Home) == mechanism.Home), fixing.Order);
            Assert.All(fixing.Generators, member => Assert.Equal(mechanism.Home, member.Image(mechanism.Home)));
        }
    }

    [Fact]
    public void What_is_no_symmetry_is_refused()
    {
        var cube = Make.Cube(3);
        var exception = Assert.Throws<ArgumentException>(() => SymmetryGroup.Generate(cube, cube.Turns[0].Permutation, Permutation.Parse("(1 2)")));
        Assert.Equal("symmetries", exception.ParamName);
        Assert.Throws<ArgumentException>(() => SymmetryGroup.Generate(cube, Permutation.FromCycle(0, 60)));
    }

    [Fact]
    public void A_member_is_found_by_where_it_takes_the_sites()
    {
        var board = Make.Board(3, 2);
        var group = SymmetryGroup.Of(board);

        Assert.Equal("(1 3)(4 6)", group.Member(Permutation.Parse("(1 3)(4 6)"))!.ToString());
        Assert.Null(group.Member(Permutation.Parse("(1 3)")));
    }
}
