using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Mechanisms;

/// <summary>The cursor for game loops, against immutable states.</summary>
public class PlaythroughTests
{
    private static readonly Mechanism Fused = MechanismBuilder.Cube("Fused", 3).Block("UFR", "UF").Block("DBL", "DB").Build();

    public static TheoryData<string> Mechanisms => ["cube", "board", "ratchet", "wide"];

    [Theory]
    [MemberData(nameof(Mechanisms))]
    public void Random_steps_agree_with_immutable_states(string which)
    {
        var mechanism = Make(which);
        var play = new Playthrough(mechanism);
        var random = new SeededRandom(3);
        var states = new List<State> { mechanism.HomeState };
        Span<int> free = stackalloc int[mechanism.Steps.Length];
        for (var i = 0; i < 500; i++)
        {
            Assert.Equal(states[^1].Shape!.FreeSteps().Select(step => step.Index), free[..play.FreeSteps(free)].ToArray());
            var step = random.NextInt32(mechanism.Steps.Length);
            var isFree = states[^1].TryStep(mechanism.Steps[step], out var next);
            Assert.Equal(isFree, play.IsFree(step));
            Assert.Equal(isFree, play.WhyBarred(step) is null);
            Assert.Equal(isFree, play.TryStep(step));
            states.AddRange(isFree ? [next!] : []);
            Assert.Equal(states[^1], play.State);
            Assert.Equal(states[^1].Shape, play.State.Shape);
            if (random.NextInt32(4) == 0 && play.Undo())
            {
                states.RemoveAt(states.Count - 1);
                Assert.Equal(states[^1], play.State);
                Assert.Equal(states[^1].Shape, play.State.Shape);
            }
        }

        Assert.Equal(states.Count - 1, play.StepCount);
        play.Reset();
        Assert.True(play.IsHome);
        Assert.Equal((0, 0), (play.StepCount, play.RedoCount));
    }

    [Fact]
    public void Undone_steps_can_be_done_again_until_another_is_done()
    {
        var play = new Playthrough(Fused);
        Assert.True(play.TryStep(Step("U")));
        Assert.True(play.TryStep(Step("F'")) || play.TryStep(Step("R")) || play.TryStep(Step("U")));
        var end = play.State;

        Assert.True(play.Undo());
        Assert.True(play.Undo());
        Assert.False(play.Undo());
        Assert.True(play.Redo());
        Assert.True(play.Redo());
        Assert.False(play.Redo());
        Assert.Equal(end, play.State);

        play.Undo();
        Assert.True(play.TryStep(Step("U'")));
        Assert.Equal(0, play.RedoCount);
        Assert.True(play.IsHome);
    }

    [Fact]
    public void A_barred_step_changes_nothing_and_names_what_bars_it()
    {
        var play = new Playthrough(Fused);

        Assert.False(play.TryStep(Step("R")));
        Assert.Equal("it would tear the block [UF UFR]", play.WhyBarred(Step("R").Index)!.ToString());
        Assert.True(play.IsHome);
        Assert.Equal(0, play.StepCount);
    }

    [Fact]
    public void A_saved_play_is_restored_with_the_steps_taken_back()
    {
        var play = new Playthrough(Fused.HomeState.Apply(Fused.ParseWord("U")), historyCapacity: 1);
        play.TryStep(Step("U"));
        play.TryStep(Step("D"));
        play.TryStep(Step("U"));
        play.Undo();
        var saved = play.Save();

        var restored = Playthrough.Restore(Fused, saved);

        Assert.Equal(play.State, restored.State);
        Assert.Equal((play.StepCount, play.RedoCount), (restored.StepCount, restored.RedoCount));
        Assert.True(restored.Redo());
        while (restored.Undo())
        {
        }

        Assert.Equal(play.Start.Labels, restored.State.Labels);
    }

    [Fact]
    public void A_saved_play_of_another_mechanism_is_refused()
    {
        var plain = new Playthrough(MechanismBuilder.Cube("Plain", 3).Build());
        plain.TryStep(plain.Mechanism.FindTurn("R")!.Forward);

        var exception = Assert.Throws<ArgumentException>(() => Playthrough.Restore(Fused, plain.Save()));

        Assert.StartsWith("Step 1 of the saved play is number 2, which cannot be done there", exception.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Steps_allocate_nothing()
    {
        var play = new Playthrough(Fused);
        Span<int> free = stackalloc int[Fused.Steps.Length];
        var random = new SeededRandom(5);
        Run(200, free);
        var before = GC.GetAllocatedBytesForCurrentThread();
        Run(800, free);
        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);

        void Run(int count, Span<int> room)
        {
            for (var i = 0; i < count; i++)
            {
                play.TryStep(random.NextInt32(12));
                play.FreeSteps(room);
                if (i % 5 == 0 && play.Undo() && i % 10 == 0)
                {
                    play.Redo();
                }
            }
        }
    }

    [Fact]
    public void Too_little_room_for_free_steps_is_refused() =>
        Assert.StartsWith("There is room for 1 steps, and more are free", Assert.Throws<ArgumentException>(() => new Playthrough(Fused).FreeSteps(new int[1])).Message, StringComparison.Ordinal);

    [Fact]
    public void A_step_of_another_mechanism_is_refused() =>
        Assert.Throws<ArgumentException>(() => new Playthrough(Fused).TryStep(MechanismBuilder.Cube("Plain", 3).Build().Steps[0]));

    private static Mechanism Make(string which) => which switch
    {
        "cube" => Fused,
        "board" => MechanismBuilder.Board("Board", 3, 3).Build(),
        "ratchet" => MechanismBuilder.Custom("Ratchet", 6).Turn("A", "(1 2 3)", turn => turn.OneWay()).Turn("B", "(3 4 5 6)", turn => turn.BarredBy("pin@3")).Mark("pin", "1").Block("4", "5").Build(),
        _ => MechanismBuilder.Cube("Wide", 7).Block("7,7,7", "6,7,7").Build(),
    };

    private static Step Step(string name) => Fused.Steps.Single(step => step.Name == name);
}
