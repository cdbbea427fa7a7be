using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

/// <summary>Whatever claims to be proven, against a plain search over all states: where steps share names, symmetries and blocks meet, weights are 0 and steps cannot be undone, and the end has another shape than home.</summary>
public class ProofTests
{
    private const int MostStates = 800;

    public static TheoryData<string> Mechanisms => [.. Known.Keys];

    private static readonly Dictionary<string, Func<Mechanism>> Known = new()
    {
        ["board 3x2"] = () => Make.Board(3, 2),
        ["board 4x1 with two gaps"] = () => Make.Board(4, 1, "2", "4"),
        ["board 3x2 with three gaps"] = () => Make.Board(3, 2, "1", "2", "6"),
        ["graph board, a ring with a chord"] = () => Make.GraphBoard(5, [(1, 2), (2, 3), (3, 4), (4, 5), (5, 1), (1, 3)], 1),
        ["2x2x2 of half turns with a block"] = () => Make.Cube(2, "U2 R2 F2", "UFR UFL"),
        ["2x2x2 with two blocks"] = () => Make.Cube(2, "", "UFR UFL", "DFR DBR"),
        ["2x2x2 with three blocks"] = () => Make.Cube(2, "", "UFR UFL", "UBR UBL", "DFR DFL"),
        ["centre twist"] = () => Mechanism.Create(new MechanismDefinition { Name = "twist", Family = new CubeFamily(3, centreTwist: true), Use = ["U2", "R2"] }),
        ["ring with names in common"] = () => Mechanism.Create(new MechanismDefinition
        {
            Name = "ring",
            Sites = Make.Numbers(5),
            Marks = [Make.Mark("gap", "1")],
            Turns =
            [
                .. Enumerable.Range(1, 5).Select(i => new TurnDefinition
                {
                    Name = $"E{i}",
                    Moves = $"({i} {(i % 5) + 1})",
                    Guard = new GuardDefinition { Needs = [$"gap@{i}"] },
                    As = "N",
                    BackAs = "Z",
                }),
                new TurnDefinition { Name = "Q", Moves = "(2 4)", Guard = new GuardDefinition { BarredBy = ["gap@2"] }, IsOneWay = true },
            ],
        }),
    };

    [Theory]
    [MemberData(nameof(Mechanisms))]
    public void Answers_between_states_are_those_of_a_plain_search(string name) => Assert.True(CheckStates(Known[name](), 5), "There are too many states.");

    [Fact]
    public void Answers_between_states_of_random_mechanisms_are_so_too()
    {
        for (var seed = 5000UL; seed < 5040; seed++)
        {
            CheckStates(Mechanism.Create(RandomMechanisms.From(seed)), seed);
        }
    }

    [Fact]
    public void Answers_about_goals_are_those_of_a_plain_search() => RandomMechanisms.ForFixedSeeds(seed =>
    {
        var random = new SeededRandom(seed);
        var mechanism = LevelMeasuresTests.WithGoal(RandomMechanisms.From(seed), random);
        var all = BruteDistances.Reachable(mechanism.HomeState, MostStates);
        if (all.Count > MostStates)
        {
            return;
        }

        foreach (var metric in Metrics(mechanism, random))
        {
            var distances = BruteDistances.From(all.Where(LevelMeasuresTests.IsGoal), [.. all], metric, backwards: true);
            for (var i = 0; i < 3; i++)
            {
                var from = all[random.NextInt32(all.Count)];
                int? distance = distances.TryGetValue(from, out var known) ? known : null;
                foreach (var (most, maxStates) in Bounds(distance).SelectMany(most => new[] { (most, 1_000_000), (most, 4) }))
                {
                    CheckAnswer(new Solver(mechanism, new SolveOptions { Metric = metric, MaxLength = most, MaxStates = maxStates, MaxNodes = 10_000, MaxStagedMoves = 500 }).Solve(from), metric, most, distance);
                }
            }
        }
    });

    // False where there are too many states.
    private static bool CheckStates(Mechanism mechanism, ulong seed)
    {
        var all = BruteDistances.Reachable(mechanism.HomeState, MostStates);
        if (all.Count > MostStates)
        {
            return false;
        }

        HashSet<State> set = [.. all];
        var random = new SeededRandom(seed + 3);
        foreach (var metric in Metrics(mechanism, random))
        {
            // With hardly any tables, with small ones and a search from both ends before, with all that there is room for.
            BoundedSearch[] searches = [Search(40, 1), Search(400, 20), Search(1 << 20, 1)];
            BoundedSearch Search(int bytes, int meeting) =>
                new(mechanism, new BoundedOptions { Metric = metric, MaxMeetingStates = meeting, MaxNodes = 20_000, Pruning = new PruningOptions { MaxBytes = bytes } });
            for (var i = 0; i < 3; i++)
            {
                var (from, to) = (all[random.NextInt32(all.Count)], all[random.NextInt32(all.Count)]);
                int? distance = BruteDistances.From([to], set, metric, backwards: true).TryGetValue(from, out var known) ? known : null;
                foreach (var most in Bounds(distance))
                {
                    foreach (var search in searches)
                    {
                        CheckAnswer(search.Find(from, to, most ?? 100), metric, most ?? 100, distance);
                    }

                    var options = new SolveOptions { Metric = metric, MaxLength = most, MaxStates = 3, MaxNodes = 10_000, MaxStagedMoves = 500 };
                    CheckAnswer(new Solver(mechanism, options).Route(from, to), metric, most, distance);
                    options = new SolveOptions { Metric = metric, MaxLength = most, MaxStates = 3, MaxNodes = 10_000, MaxTableBytes = 0, MaxStagedMoves = 0 };
                    CheckAnswer(new Solver(mechanism, options).Route(from, to), metric, most, distance);
                }
            }
        }

        return true;
    }

    private static void CheckAnswer(BoundedResult answer, Metric metric, int most, int? distance)
    {
        switch (answer.Outcome)
        {
            case BoundedOutcome.Found:
                Assert.Equal((distance, distance), ((int)metric.LengthOf(answer.Path!), (int)answer.LowerBound!));
                Assert.True(distance <= most);
                break;
            case BoundedOutcome.NoneWithinBound:
                Assert.True((distance ?? int.MaxValue) >= answer.LowerBound && answer.LowerBound > most);
                break;
            case BoundedOutcome.NoneAtAll:
                Assert.Null(distance);
                break;
            default:
                Assert.True((distance ?? int.MaxValue) >= answer.LowerBound);
                break;
        }
    }

    private static void CheckAnswer(SolveResult answer, Metric metric, int? most, int? distance)
    {
        var isThere = distance <= (most ?? int.MaxValue);
        Assert.True(answer.IsSolvable is null || answer.IsSolvable == isThere, answer.Reason);
        if (answer.HasPath)
        {
            var length = metric.LengthOf(answer.Path);
            Assert.Equal(metric.Kind, answer.Metric.Kind);
            Assert.True(length <= (most ?? int.MaxValue) && (answer.IsProvenShortest ? length == distance : length >= distance), answer.Reason);
        }
    }

    // Just enough, one too few, any length; a few where there is no way.
    private static int?[] Bounds(int? distance) => distance switch
    {
        null => [7, null],
        0 => [0, null],
        _ => [distance, distance - 1, null],
    };

    private static Metric[] Metrics(Mechanism mechanism, SeededRandom random) =>
        [Metric.Step, Metric.Run, Metric.Weights(mechanism.Turns.Select(turn => KeyValuePair.Create(turn.Name, 2 * random.NextInt32(3))))];
}
