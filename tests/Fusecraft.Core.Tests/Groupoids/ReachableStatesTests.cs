using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groupoids;

/// <summary>Counts of states over several regions, against trying everything and against counts by hand.</summary>
public class ReachableStatesTests
{
    [Fact]
    public void All_states_by_exhaustive_search_are_as_many_as_counted()
    {
        var (several, furtherOn) = (0, 0);
        for (var seed = 0UL; several < 300; seed++)
        {
            var definition = RandomMechanisms.From(seed);
            var groupoid = ShapeGroupoid.Explore(Mechanism.Create(definition));
            if (groupoid.Regions.Length > 1)
            {
                several++;
                furtherOn += groupoid.Regions.Count(region => !region.IsTrap) > 1 ? 1 : 0;
                var naive = new NaiveMechanism(definition);
                Assert.Equal((seed, naive.Arrangements([.. naive.Shapes().Keys]).Count), (seed, groupoid.CountReachableStates() ?? -1));
            }
        }

        Assert.True(furtherOn >= 50, $"only {furtherOn} have passages from other regions than home's");
    }

    // Each passage goes to the next region, where another part of the labels can be mixed: double cosets of groups that share points.
    [Fact]
    public void Regions_one_after_the_other_are_counted_as_by_exhaustive_search()
    {
        var definition = MechanismBuilder.Custom("Three reaches", 9)
            .Turn("A", "(1 2 3)", turn => turn.Needs("boat@7"))
            .Turn("B", "(3 4 5)", turn => turn.Needs("boat@8"))
            .Turn("C", "(4 5)(1 6)", turn => turn.Needs("boat@9"))
            .Turn("D", "(1 4)", turn => turn.Needs("boat@9"))
            .Turn("Down", "(7 8)(2 4)", turn => turn.Needs("boat@7").OneWay())
            .Turn("Past", "(7 8)", turn => turn.Needs("boat@7").OneWay())
            .Turn("Further", "(8 9)(5 6)", turn => turn.Needs("boat@8").OneWay())
            .Turn("Leap", "(7 9)", turn => turn.Needs("boat@7").OneWay())
            .Mark("boat", "7")
            .Build().Definition;
        var naive = new NaiveMechanism(definition);
        var groupoid = ShapeGroupoid.Explore(Mechanism.Create(definition));
        Assert.Equal(3, groupoid.Regions.Length);
        Assert.Equal(naive.Arrangements([.. naive.Shapes().Keys]).Count, groupoid.CountReachableStates());
    }

    // A boat goes down through four stations, here and there with two ways; at each some turns of six labels are free. Every region is one shape, and all that matters is how the groups lie to each other.
    [Fact]
    public void Random_groups_one_after_the_other_are_counted_as_by_exhaustive_search()
    {
        for (var seed = 0UL; seed < 100; seed++)
        {
            var random = new SeededRandom(seed);
            var builder = MechanismBuilder.Custom("Stations", 10);
            for (var station = 7; station <= 10; station++)
            {
                var (here, turns) = ($"boat@{station}", random.NextInt32(3));
                for (var i = 0; i < turns; i++)
                {
                    builder = builder.Turn($"T{station}x{i}", Some(random), turn => turn.Needs(here));
                }

                for (var next = station + 1; next <= 10; next++)
                {
                    for (var ways = random.NextInt32(3); ways > 0; ways--)
                    {
                        builder = builder.Turn($"P{station}x{next}x{ways}", $"({station} {next}){(random.NextInt32(3) == 0 ? "" : Some(random))}", turn => turn.Needs(here).OneWay());
                    }
                }
            }

            var definition = builder.Turn("Last", "(7 8)(1 2)", turn => turn.Needs("boat@7").OneWay()).Mark("boat", "7").Build().Definition;
            var naive = new NaiveMechanism(definition);
            var count = ShapeGroupoid.Explore(Mechanism.Create(definition)).CountReachableStates();
            Assert.Equal((seed, naive.Arrangements([.. naive.Shapes().Keys]).Count), (seed, count ?? -1));
        }

        static string Some(SeededRandom random)
        {
            Permutation permutation;
            do
            {
                permutation = random.NextPermutation(6);
                permutation = random.NextInt32(2) == 0 ? permutation : permutation.Power(2);
            }
            while (permutation.IsIdentity);
            return permutation.ToString();
        }
    }

    // Counted by hand. H mixes places 1 … 15 before the passage, V places 8 … 22 after it; they share Sym(8 … 15), so the passage Plain brings 15!·15!/8! permutations. Early and Late differ from it by a
    // member of H and one of V, so they bring the same. Cross first takes a label of H's places to 22: H moved there shares Sym(8 … 15, 22) with V, and these are 15!·15!/9! others.
    [Fact]
    public void Double_cosets_of_too_many_cosets_to_list_are_told_apart_and_counted()
    {
        var all = "1 2 3 4 5 6 7 8 9 10 11 12 13 14 15";
        var groupoid = ShapeGroupoid.Explore(MechanismBuilder.Custom("Wide lock", 24)
            .Turn("A", $"({all})", turn => turn.Needs("boat@23"))
            .Turn("B", "(1 2)", turn => turn.Needs("boat@23"))
            .Turn("C", "(8 9 10 11 12 13 14 15 16 17 18 19 20 21 22)", turn => turn.Needs("boat@24"))
            .Turn("D", "(8 9)", turn => turn.Needs("boat@24"))
            .Turn("Plain", "(23 24)", turn => turn.Needs("boat@23").OneWay())
            .Turn("Early", "(23 24)(1 2)", turn => turn.Needs("boat@23").OneWay())
            .Turn("Late", "(23 24)(21 22)", turn => turn.Needs("boat@23").OneWay())
            .Turn("Cross", "(23 24)(1 22)", turn => turn.Needs("boat@23").OneWay())
            .Mark("boat", "23")
            .Build());
        var order = Make.Factorial(15);
        Assert.Equal(2, groupoid.ShapeCount);
        Assert.Equal(order + (order * order / Make.Factorial(8)) + (order * order / Make.Factorial(9)), groupoid.CountReachableStates());
    }

    // Own computation, a plain search with another program: 80640. By hand: 8 shapes times 5040 at home; and in the trap the float is at 9 and all others can be mixed, 8!.
    [Fact]
    public void The_mill_race_has_as_many_states_in_its_trap_as_before_it() =>
        Assert.Equal(80640, ShapeGroupoid.Explore(MechanismFile.Load(Repository.PathOf("docs/workshop/mill-race.fuse.json"))).CountReachableStates());

    // Nothing can be done at home but to leave; what follows is a large group, twice: places 1 … 30, then places 2 … 31. Counted by hand: 1 + 30! + 30!·30.
    [Fact]
    public void Large_groups_after_a_home_without_loops_take_few_cosets()
    {
        var groupoid = ShapeGroupoid.Explore(MechanismBuilder.Custom("Late start", 34)
            .Turn("A", $"({Places(1, 30)})", turn => turn.Needs("boat@33"))
            .Turn("B", "(1 2)", turn => turn.Needs("boat@33"))
            .Turn("C", $"({Places(2, 31)})", turn => turn.Needs("boat@34"))
            .Turn("D", "(2 3)", turn => turn.Needs("boat@34"))
            .Turn("In", "(32 33)", turn => turn.Needs("boat@32").OneWay())
            .Turn("On", "(33 34)", turn => turn.Needs("boat@33").OneWay())
            .Mark("boat", "32")
            .Build());
        var order = Make.Factorial(30);
        Assert.Equal(1 + order + (30 * order), groupoid.CountReachableStates(new StateCountOptions { MaxCosets = 1000 }));

        static string Places(int first, int last) => string.Join(' ', Enumerable.Range(first, last - first + 1));
    }

    // Barges that only go forward and never pass each other: where they are says how they got there, so there is a state for each of the 16!/(8!·8!) shapes, and each is a region.
    [Fact]
    public void Thousands_of_regions_of_one_shape_are_counted()
    {
        var builder = MechanismBuilder.Custom("Convoy", 16);
        for (var site = 1; site < 16; site++)
        {
            var (here, ahead) = ($"barge@{site}", $"barge@{site + 1}");
            builder = builder.Turn($"T{site}", $"({site} {site + 1})", turn => turn.Needs(here).BarredBy(ahead).OneWay());
        }

        var groupoid = ShapeGroupoid.Explore(builder.Mark("barge", "1", "2", "3", "4", "5", "6", "7", "8").Build());
        Assert.Equal(12870, groupoid.Regions.Length);
        Assert.Equal(12870, groupoid.CountReachableStates());
    }

    [Fact]
    public void One_region_has_as_many_states_as_its_vertex_group_says()
    {
        var groupoid = ShapeGroupoid.Explore(Make.Cube(3, "", "UFR UF"));
        Assert.Equal(groupoid.VertexGroupAt(0).StateCount, groupoid.CountReachableStates(new StateCountOptions { MaxCosets = 0 }));
    }

    [Fact]
    public void A_budget_too_small_leaves_the_number_unknown_never_wrong()
    {
        var groupoid = ShapeGroupoid.Explore(Mechanism.Create(RandomMechanisms.From(WithManyPassages())));
        var exact = groupoid.CountReachableStates();
        Assert.NotNull(exact);
        Assert.Null(groupoid.CountReachableStates(new StateCountOptions { MaxCosets = 0 }));
        for (var budget = 1; budget < 200; budget++)
        {
            Assert.Contains(groupoid.CountReachableStates(new StateCountOptions { MaxCosets = budget }), new BigInteger?[] { null, exact });
        }

        Assert.Throws<ArgumentOutOfRangeException>(() => groupoid.CountReachableStates(new StateCountOptions { MaxCosets = -1 }));
    }

    [Fact]
    public void The_count_ends_when_asked_to()
    {
        var groupoid = ShapeGroupoid.Explore(Mechanism.Create(RandomMechanisms.From(WithManyPassages())));
        Assert.ThrowsAny<OperationCanceledException>(() => groupoid.CountReachableStates(cancellationToken: new CancellationToken(canceled: true)));
    }

    [Fact]
    public void An_ended_exploration_has_no_count()
    {
        var groupoid = ShapeGroupoid.Explore(Make.Board(3, 3), new ExplorationOptions { MaxShapes = 2 });
        Assert.Throws<InvalidOperationException>(() => groupoid.CountReachableStates());
    }

    private static ulong WithManyPassages()
    {
        for (var seed = 0UL; ; seed++)
        {
            if (ShapeGroupoid.Explore(Mechanism.Create(RandomMechanisms.From(seed))) is { PassageCount: > 20, Regions.Length: > 3 })
            {
                return seed;
            }
        }
    }
}
