using System.Numerics;
using System.Runtime.CompilerServices;

namespace Fusecraft.Mechanisms;

/// <summary>
/// The alternatives of all guards numbered from 0, so that those that hold in a shape are the bits of one word, and so are the free steps. Where no guard has several alternatives the two
/// numberings are one.
/// </summary>
internal sealed class StepMasks
{
    private readonly ulong _forward;
    private readonly ulong _backward;
    private readonly ulong[] _sharedNames;

    private StepMasks(Mechanism mechanism, (int Step, int Alternative)[] terms)
    {
        Terms = terms;
        StepCount = mechanism.Steps.Length;
        foreach (var step in mechanism.Steps)
        {
            (step.IsForward ? ref _forward : ref _backward) |= 1UL << step.Index;
        }

        _sharedNames = [.. mechanism.StepNames.Shared.Select(steps => steps.Aggregate(0UL, (mask, step) => mask | (1UL << step.Index)))];
    }

    /// <summary>The alternatives: bit <c>i</c> stands for entry <c>i</c>. Step -1 marks a bit that stands for none.</summary>
    public (int Step, int Alternative)[] Terms { get; }

    public int StepCount { get; }

    /// <summary>True when bit <c>i</c> of the alternatives belongs to step <c>i</c>.</summary>
    public bool IsOneToOne { get; private init; }

    public static StepMasks? Of(Mechanism mechanism, ShapeBoard board)
    {
        var moves = board.Moves;
        if (moves.Length > 64)
        {
            return null;
        }

        var isOneToOne = true;
        var terms = new List<(int Step, int Alternative)>();
        for (var step = 0; step < moves.Length; step++)
        {
            if (moves[step].HasConditions)
            {
                return null;
            }

            isOneToOne &= moves[step].AlternativeCount <= 1;
            for (var alternative = 0; alternative < moves[step].AlternativeCount; alternative++)
            {
                terms.Add((step, alternative));
            }
        }

        if (isOneToOne)
        {
            var all = new (int Step, int Alternative)[moves.Length];
            Array.Fill(all, (-1, 0));
            terms.ForEach(term => all[term.Step] = term);
            return new StepMasks(mechanism, all) { IsOneToOne = true };
        }

        return terms.Count > 64 ? null : new StepMasks(mechanism, [.. terms]);
    }

    /// <summary>The free steps, given the alternatives that hold.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ulong StepsOf(ulong terms) => IsOneToOne ? terms : Gather(terms);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int FreeForwardSteps(ulong steps) => BitOperations.PopCount(steps & _forward);

    /// <summary>The number of turns with a free step. A backward step stands right behind its forward one.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int FreeTurns(ulong steps) => BitOperations.PopCount(steps & _forward) + BitOperations.PopCount(steps & _backward & ~((steps & _forward) << 1));

    /// <summary>True when two of the steps are written alike.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public bool Clash(ulong steps)
    {
        foreach (var group in _sharedNames)
        {
            if (BitOperations.PopCount(steps & group) > 1)
            {
                return true;
            }
        }

        return false;
    }

    private ulong Gather(ulong terms)
    {
        var steps = 0UL;
        for (; terms != 0; terms &= terms - 1)
        {
            steps |= 1UL << Terms[BitOperations.TrailingZeroCount(terms)].Step;
        }

        return steps;
    }
}
