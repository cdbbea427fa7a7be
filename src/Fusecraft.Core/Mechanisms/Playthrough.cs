using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>
/// A cursor on a mechanism for game loops: try steps, take them back, ask which are free. The one mutable type of the library; not safe to share between threads.
/// </summary>
/// <remarks>Steps are given by their numbers in <see cref="Mechanism.Steps"/>. No method on the way of a step allocates, except when the history outgrows its capacity.</remarks>
public sealed class Playthrough
{
    private readonly StepMoves[] _moves;
    private readonly SiteMover _mover;
    private readonly int _boardWords;
    private readonly ulong[] _startLabels;

    // The shape's key, then the label on each site.
    private ulong[] _now;
    private ulong[] _next;
    private ushort[] _history;

    /// <summary>Starts at home.</summary>
    /// <param name="mechanism">The mechanism to play.</param>
    public Playthrough(Mechanism mechanism)
        : this((mechanism ?? throw new ArgumentNullException(nameof(mechanism))).HomeState)
    {
    }

    /// <summary>Starts at a state.</summary>
    /// <param name="start">A state with a shape; <see cref="Reset"/> comes back to it.</param>
    /// <param name="historyCapacity">How many steps fit before the history grows.</param>
    /// <exception cref="ArgumentException">The state has no shape.</exception>
    public Playthrough(State start, int historyCapacity = 1024)
    {
        ArgumentNullException.ThrowIfNull(start);
        ArgumentOutOfRangeException.ThrowIfNegative(historyCapacity);
        if (start.Shape is null)
        {
            throw new ArgumentException("The state lies where no turns can bring the puzzle, so it cannot be played.", nameof(start));
        }

        Start = start;
        Mechanism = start.Mechanism;
        _moves = Mechanism.Board.Moves.ToArray();
        _mover = Mechanism.SiteMover;
        _boardWords = Mechanism.Board.Words;
        _now = new ulong[_boardWords + _mover.Words];
        _next = new ulong[_now.Length];
        _history = new ushort[historyCapacity];
        _startLabels = new ulong[_mover.Words];
        var labels = new int[Mechanism.SiteCount];
        start.Labels.Inverse().CopyImages(labels);
        _mover.Load(labels, _startLabels);
        Reset();
    }

    /// <summary>The mechanism that is played.</summary>
    public Mechanism Mechanism { get; }

    /// <summary>The state the play started from.</summary>
    public State Start { get; }

    /// <summary>The number of steps done and not taken back.</summary>
    public int StepCount { get; private set; }

    /// <summary>The number of steps that <see cref="Redo"/> can do again.</summary>
    public int RedoCount { get; private set; }

    /// <summary>The state now, as an immutable value. Allocates.</summary>
    public State State
    {
        get
        {
            var labels = new int[Mechanism.SiteCount];
            CopyLabels(labels);
            return new State(Mechanism, Permutation.FromSources(labels), Shape);
        }
    }

    /// <summary>True when every label is home.</summary>
    public bool IsHome
    {
        get
        {
            for (var site = 0; site < Mechanism.SiteCount; site++)
            {
                if (_mover.NumberOn(site, Labels) != site)
                {
                    return false;
                }
            }

            return true;
        }
    }

    private ReadOnlySpan<ulong> Key => _now.AsSpan(0, _boardWords);

    private ReadOnlySpan<ulong> Labels => _now.AsSpan(_boardWords);

    private Shape Shape => new(Mechanism, Key);

    /// <summary>The label that is on a site now, named by its home site.</summary>
    /// <param name="site">The number of a site.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such site.</exception>
    public int LabelOn(int site)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(site);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(site, Mechanism.SiteCount);
        return _mover.NumberOn(site, Labels);
    }

    /// <summary>Writes the label that is on each site now.</summary>
    /// <param name="labels">Room for one label a site.</param>
    /// <exception cref="ArgumentException">There is not enough room.</exception>
    public void CopyLabels(Span<int> labels)
    {
        if (labels.Length < Mechanism.SiteCount)
        {
            throw new ArgumentException($"There is room for {labels.Length} labels; the mechanism has {Mechanism.SiteCount} sites.", nameof(labels));
        }

        for (var site = 0; site < Mechanism.SiteCount; site++)
        {
            labels[site] = _mover.NumberOn(site, Labels);
        }
    }

    /// <summary>True when the step is free now.</summary>
    /// <param name="step">The number of a step.</param>
    /// <exception cref="IndexOutOfRangeException">There is no such step.</exception>
    public bool IsFree(int step) => _moves[step].IsFree(Key);

    /// <summary>What bars the step now, or null when it is free. Allocates.</summary>
    /// <param name="step">The number of a step.</param>
    public Barrier? WhyBarred(int step) => Shape.WhyBarred(Mechanism.Steps[step]);

    /// <summary>Does a step if it is free; forgets the steps that could have been done again. Takes time in the number of sites.</summary>
    /// <param name="step">The number of a step.</param>
    /// <returns>False, and nothing changes, where the step is barred.</returns>
    /// <exception cref="IndexOutOfRangeException">There is no such step.</exception>
    public bool TryStep(int step)
    {
        if (!_moves[step].IsFree(Key))
        {
            return false;
        }

        Do(step);
        if (StepCount == _history.Length)
        {
            Array.Resize(ref _history, Math.Max(64, 2 * _history.Length));
        }

        _history[StepCount++] = (ushort)step;
        RedoCount = 0;
        return true;
    }

    /// <summary>Does a step if it is free.</summary>
    /// <param name="step">A step of this mechanism.</param>
    /// <returns>False, and nothing changes, where the step is barred.</returns>
    public bool TryStep(Step step)
    {
        ArgumentNullException.ThrowIfNull(step);
        Mechanism.Board.Of(step);
        return TryStep(step.Index);
    }

    /// <summary>Writes the numbers of the steps that are free now, ascending.</summary>
    /// <param name="steps">Room for them; the number of steps of the mechanism is always enough.</param>
    /// <returns>How many steps are free.</returns>
    /// <exception cref="ArgumentException">There is not enough room.</exception>
    public int FreeSteps(Span<int> steps)
    {
        var count = 0;
        for (var step = 0; step < _moves.Length; step++)
        {
            if (_moves[step].IsFree(Key))
            {
                if (count == steps.Length)
                {
                    throw new ArgumentException($"There is room for {steps.Length} steps, and more are free; room for {_moves.Length} is always enough.", nameof(steps));
                }

                steps[count++] = step;
            }
        }

        return count;
    }

    /// <summary>Takes the last step back. This is not a step: it works where the opposite step is barred, too.</summary>
    /// <returns>False at the start.</returns>
    public bool Undo()
    {
        if (StepCount == 0)
        {
            return false;
        }

        UndoStep(_history[--StepCount]);
        RedoCount++;
        return true;
    }

    /// <summary>Does the step again that was taken back last.</summary>
    /// <returns>False where none was taken back since the last step.</returns>
    public bool Redo()
    {
        if (RedoCount == 0)
        {
            return false;
        }

        Do(_history[StepCount++]);
        RedoCount--;
        return true;
    }

    /// <summary>Goes back to the start and forgets all steps.</summary>
    public void Reset()
    {
        Start.Shape!.Key.CopyTo(_now);
        _startLabels.CopyTo(_now.AsSpan(_boardWords));
        StepCount = 0;
        RedoCount = 0;
    }

    /// <summary>The play so far as an immutable value from which it can be restored. Allocates.</summary>
    public SavedPlaythrough Save() => new(Start.Labels, [.. _history.AsSpan(0, StepCount + RedoCount)], StepCount);

    /// <summary>Continues a saved play.</summary>
    /// <param name="mechanism">The mechanism it was played on.</param>
    /// <param name="saved">What <see cref="Save"/> gave.</param>
    /// <exception cref="ArgumentException">The saved play does not fit the mechanism: its start has no shape, or one of its steps is barred.</exception>
    public static Playthrough Restore(Mechanism mechanism, SavedPlaythrough saved)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        ArgumentNullException.ThrowIfNull(saved);
        var play = new Playthrough(mechanism.StateOf(saved.Start), Math.Max(1024, saved.Steps.Length));
        for (var i = 0; i < saved.Steps.Length; i++)
        {
            if (saved.Steps[i] >= mechanism.Steps.Length || !play.TryStep(saved.Steps[i]))
            {
                throw new ArgumentException($"Step {i + 1} of the saved play is number {saved.Steps[i]}, which cannot be done there; the play belongs to another mechanism.", nameof(saved));
            }
        }

        while (play.StepCount > saved.Position)
        {
            play.Undo();
        }

        return play;
    }

    private void Do(int step)
    {
        _moves[step].Move(Key, _next);
        _mover.Move(step, Labels, _next.AsSpan(_boardWords));
        (_now, _next) = (_next, _now);
    }

    private void UndoStep(int step)
    {
        _moves[step].MoveBack(Key, _next);
        _mover.MoveBack(step, Labels, _next.AsSpan(_boardWords));
        (_now, _next) = (_next, _now);
    }
}
