using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Shortens words: every stretch of a word that a table of short words knows a cheaper word for is replaced, and stretches twice as long by two short words that meet. What steps do in vain, whatever commutes with
/// them in between, falls away on the way.
/// </summary>
internal sealed class WindowShortening
{
    /// <summary>The size of a table where all words start at one shape, and where each shape needs one of its own.</summary>
    private const int LargeBall = 20_000;
    private const int SmallBall = 1_500;

    /// <summary>So many tables are kept.</summary>
    private const int MaxBalls = 300;

    /// <summary>Meetings are looked for from so many words at the far end.</summary>
    private const int Meetings = 1_500;

    private readonly Mechanism _mechanism;
    private readonly StageFrame _frame;
    private readonly Metric _metric;
    private readonly int[] _classes;
    private readonly Dictionary<int, ShortBall> _balls = [];

    /// <param name="mechanism">The mechanism.</param>
    /// <param name="frame">The shapes of a region with all its moves.</param>
    /// <param name="metric">How the length of a word is counted.</param>
    public WindowShortening(Mechanism mechanism, StageFrame frame, Metric metric)
    {
        _mechanism = mechanism;
        _frame = frame;
        _metric = metric;
        _classes = Metric.RunClasses(mechanism);
    }

    /// <summary>A word with the same permutation between the same shapes, no longer than the given one in the metric; as many steps at most where it is as long.</summary>
    /// <param name="shape">The frame's number of the shape where it starts; the word stays in the frame.</param>
    /// <param name="steps">The word.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public List<Step> Shorten(int shape, IReadOnlyList<Step> steps, CancellationToken cancellation)
    {
        var word = Runs(shape, steps);
        for (var start = 0; start < word.Count;)
        {
            cancellation.ThrowIfCancellationRequested();
            if (Replacement(word, start) is var (end, shorter))
            {
                List<Step> changed = [.. word[..start].SelectMany(run => run.Steps), .. shorter, .. word[end..].SelectMany(run => run.Steps)];
                word = Runs(shape, changed);

                // What comes just before may now go with what comes after.
                start = Math.Max(0, start - 8);
            }
            else
            {
                start++;
            }
        }

        return [.. word.SelectMany(run => run.Steps)];
    }

    // A stretch from a run on, with a shorter word for it.
    private (int End, List<Step> Word)? Replacement(List<Run> word, int start)
    {
        var ball = BallAt(word[start].Shape);
        var permutation = Permutation.Identity;
        var radius = ball.Cost(ball.Count - 1);
        var (length, steps, cost) = (0L, 0, 0L);
        for (var end = start; end < word.Count; end++)
        {
            permutation *= word[end].Permutation;
            length += word[end].Length;
            steps += word[end].Steps.Count;
            cost += word[end].Length;
            if (ball.Find(permutation) is >= 0 and var entry && IsShorter(Steps(ball.Word(entry)), length, steps, out var shorter))
            {
                return (end + 1, shorter);
            }

            if (_mechanism.IsReversible && end > start && cost > radius && cost <= 2 * radius && Meeting(ball, word, end + 1, permutation, length, steps) is { } met)
            {
                return (end + 1, met);
            }
        }

        return null;
    }

    // One word from the start of the stretch and one from its end that meet.
    private List<Step>? Meeting(ShortBall ball, List<Run> word, int end, Permutation permutation, long length, int steps)
    {
        var back = BallAt(end < word.Count ? word[end].Shape : word[end - 1].Target);
        for (var entry = 0; entry < Math.Min(back.Count, Meetings); entry++)
        {
            if (ball.Find(permutation * back[entry]) is >= 0 and var first && (_metric.Kind == MetricKind.Weights || ball.Cost(first) + back.Cost(entry) <= length))
            {
                List<Step> met = [.. Steps(ball.Word(first)), .. Steps(back.Word(entry)).AsEnumerable().Reverse().Select(step => step.Opposite!)];
                if (IsShorter(met, length, steps, out var shorter))
                {
                    return shorter;
                }
            }
        }

        return null;
    }

    private bool IsShorter(List<Step> word, long length, int steps, out List<Step> shorter)
    {
        shorter = word;
        var own = LengthOf(word);
        return own < length || (own == length && word.Count < steps);
    }

    private List<Step> Steps(int[] word) => [.. word.Select(step => _mechanism.Steps[step])];

    private long LengthOf(List<Step> word) => _metric.LengthOf(word, _classes);

    private ShortBall BallAt(int shape)
    {
        if (!_balls.TryGetValue(shape, out var ball))
        {
            if (_balls.Count >= MaxBalls)
            {
                _balls.Clear();
            }

            _balls.Add(shape, ball = new ShortBall(_frame, shape, _frame.ShapeCount == 1 ? LargeBall : SmallBall));
        }

        return ball;
    }

    // A word run by run; what runs do in vain is taken out first.
    private List<Run> Runs(int shape, IReadOnlyList<Step> steps)
    {
        var runs = new List<Run>();
        foreach (var step in PathShortening.Shorten(steps))
        {
            var target = _frame.After(shape, step.Index);
            if (runs.Count == 0 || _classes[runs[^1].Steps[^1].Index] != _classes[step.Index])
            {
                runs.Add(new Run(shape));
            }

            runs[^1].Steps.Add(step);
            runs[^1].Permutation *= step.Permutation;
            runs[^1].Target = shape = target;
        }

        runs.ForEach(run => run.Length = LengthOf(run.Steps));
        return runs;
    }

    private sealed class Run(int shape)
    {
        public int Shape { get; } = shape;

        public int Target { get; set; }

        public List<Step> Steps { get; } = [];

        public Permutation Permutation { get; set; }

        public long Length { get; set; }
    }
}
