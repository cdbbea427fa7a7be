using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Mechanisms;

/// <summary>Guards that are functions of the shape: what they bar, and that they are explored like any other.</summary>
public class CodedGuardTests
{
    [Fact]
    public void Guards_written_in_code_give_what_the_same_guards_written_as_marks_give()
    {
        var coded = 0;
        for (var seed = 0UL; seed < 300; seed++)
        {
            var definition = RandomMechanisms.From(seed);
            var marks = ShapeGroupoid.Explore(Mechanism.Create(definition));
            var code = ShapeGroupoid.Explore(Mechanism.Create(Coded(definition)), new ExplorationOptions { DegreeOfParallelism = 1 + (int)(seed % 2) });
            coded += definition.Turns.Any(turn => !turn.Guard.IsAlways) && marks.ShapeCount > 10 ? 1 : 0;
            Assert.Equal(
                (marks.ShapeCount, marks.FreeTurnCount, marks.DeadEndCount, marks.StuckShapeCount, marks.Regions.Length, marks.VertexGroupAt(0).Order),
                (code.ShapeCount, code.FreeTurnCount, code.DeadEndCount, code.StuckShapeCount, code.Regions.Length, code.VertexGroupAt(0).Order));
            for (var shape = 0; shape < marks.ShapeCount; shape++)
            {
                Assert.Equal(marks.ShapeAt(shape).ToString(), code.ShapeAt(shape).ToString());
                Assert.All(marks.Mechanism.Steps, step => Assert.Equal(marks.After(shape, step), code.After(shape, code.Mechanism.Steps[step.Index])));
            }
        }

        Assert.True(coded > 50);
    }

    // Two pins on a ring of six may turn only while they are not opposite each other: no list of marks says that as shortly.
    [Fact]
    public void A_condition_bars_a_step_and_its_undoing_and_is_named()
    {
        var mechanism = MechanismBuilder.Custom("Two pins", 6)
            .Turn("A", "(1 2 3 4 5 6)", turn => turn.When(shape => Distance(shape) != 3))
            .Turn("B", "(1 2)")
            .Mark("pin", "1", "3")
            .Build();
        var groupoid = ShapeGroupoid.Explore(mechanism);

        for (var shape = 0; shape < groupoid.ShapeCount; shape++)
        {
            var at = groupoid.ShapeAt(shape);
            Assert.Equal(Distance(at) != 3, at.IsFree(mechanism.FindTurn("A")!.Forward));
            Assert.Equal(Distance(at) != 3, at.IsFree(mechanism.FindTurn("A")!.Backward!));
        }

        // Of the 15 pairs of sites only 3 and 6 are never reached: opposite, and B leaves them alone.
        Assert.Equal(14, groupoid.ShapeCount);
        var opposite = Enumerable.Range(0, 14).Select(groupoid.ShapeAt).First(shape => Distance(shape) == 3);
        Assert.Equal("its condition in code does not hold", opposite.WhyBarred(mechanism.FindTurn("A")!.Forward)!.ToString());
        Assert.Single(groupoid.Regions);
    }

    [Fact]
    public void Several_conditions_all_must_hold_and_alternatives_may_have_their_own()
    {
        var mechanism = MechanismBuilder.Custom("Conditions", 4)
            .Turn("A", "(1 2 3 4)", turn => turn.When(shape => Pins(shape) != 1).When(shape => Pins(shape) != 2))
            .Turn("B", "(1 2 3 4)", turn => turn.AnyOf(guard => guard.When(shape => Pins(shape) == 1), guard => guard.Needs("pin@3")))
            .Turn("C", "(1 2)", turn => turn.Back(guard => guard.When(shape => Pins(shape) == 4)))
            .Mark("pin", "1")
            .Build();
        var groupoid = ShapeGroupoid.Explore(mechanism);

        Assert.Equal(4, groupoid.ShapeCount);
        Assert.All(Enumerable.Range(0, 4).Select(groupoid.ShapeAt), shape =>
        {
            Assert.Equal(Pins(shape) is 3 or 4, shape.IsFree(mechanism.Turns[0].Forward));
            Assert.Equal(Pins(shape) is 1 or 3, shape.IsFree(mechanism.Turns[1].Forward));
            Assert.Equal(Pins(shape) == 4, shape.IsFree(mechanism.Turns[2].Backward!));
        });

        static int Pins(Shape shape) => shape.Marks[0].Site + 1;
    }

    [Fact]
    public void No_file_is_written_of_a_mechanism_with_a_guard_in_code()
    {
        var mechanism = MechanismBuilder.Custom("Coded", 3).Turn("A", "(1 2 3)", turn => turn.Back(guard => guard.AnyOf(other => other.When(_ => true)))).Build();
        var path = Path.Combine(Path.GetTempPath(), Path.GetRandomFileName());

        Assert.Contains("Turn A has a guard written in code", Assert.Throws<NotSupportedException>(() => MechanismFile.Write(mechanism)).Message, StringComparison.Ordinal);
        Assert.Throws<NotSupportedException>(() => MechanismFile.Save(mechanism, path));
        Assert.Throws<NotSupportedException>(() => ShapeGroupoid.Explore(mechanism).Save(new MemoryStream()));
        Assert.Throws<NotSupportedException>(() => ShapeGroupoid.Load(mechanism, new MemoryStream()));
        Assert.False(File.Exists(path));
    }

    [Fact]
    public void What_a_condition_throws_reaches_the_caller()
    {
        var definition = new MechanismDefinition
        {
            Name = "Failing",
            Sites = Make.Numbers(40),
            Turns = [.. Enumerable.Range(0, 4).Select(i => new TurnDefinition
            {
                Name = $"T{i}",
                Moves = $"({string.Join(' ', Enumerable.Range((10 * i) + 1, 10))})",
                Guard = new GuardDefinition { When = shape => shape.Marks[0].Site < 9 ? true : throw new FormatException("as it is") },
            })],
            Marks = [.. Enumerable.Range(0, 4).Select(i => Make.Mark($"pin{i}", $"{(10 * i) + 1}"))],
        };
        Assert.Equal("as it is", Assert.Throws<FormatException>(() => ShapeGroupoid.Explore(Mechanism.Create(definition))).Message);
    }

    private static int Distance(Shape shape) => shape.Marks[1].Site - shape.Marks[0].Site;

    private static MechanismDefinition Coded(MechanismDefinition definition) => new()
    {
        Name = definition.Name,
        Sites = definition.Sites,
        Pieces = definition.Pieces,
        Blocks = definition.Blocks,
        Marks = definition.Marks,
        Turns = definition.Turns.ConvertAll(turn => new TurnDefinition
        {
            Name = turn.Name,
            Moves = turn.Moves,
            Carries = turn.Carries,
            IsOneWay = turn.IsOneWay,
            As = turn.As,
            BackAs = turn.BackAs,
            Guard = Coded(turn.Guard),
            Back = turn.Back is null ? null : Coded(turn.Back),
        }),
    };

    private static GuardDefinition Coded(GuardDefinition guard) => new() { When = shape => Holds(guard, [.. shape.Marks.Select(mark => $"{mark.Mark}@{shape.Mechanism.SiteNames[mark.Site]}")]) };

    private static bool Holds(GuardDefinition guard, HashSet<string> marks) =>
        guard.Needs.All(marks.Contains) && !guard.BarredBy.Any(marks.Contains) && (guard.AnyOf.IsEmpty || guard.AnyOf.Any(other => Holds(other, marks)));
}
