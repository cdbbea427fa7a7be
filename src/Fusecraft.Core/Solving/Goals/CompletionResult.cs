using System.Diagnostics.CodeAnalysis;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>What can be said of a state given by its colours alone: a labelled state that shows them, a proof that none does, or that a budget ended before either.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class CompletionResult
{
    private CompletionResult(bool? isPossible, State? state, string reason)
    {
        IsPossible = isPossible;
        State = state;
        Reason = reason;
    }

    /// <summary>True: a state that can be reached from home shows the colours. False: proven that none does. Null: a budget ended before either was settled.</summary>
    public bool? IsPossible { get; }

    /// <summary>A state that shows the colours and can be reached from home; of several one in a shape nearest to home. Null where there is none, or where a budget ended before one was found.</summary>
    public State? State { get; }

    /// <summary>In one sentence, how the answer was settled or what ended the work.</summary>
    public string Reason { get; }

    /// <summary>True when a state was found.</summary>
    [MemberNotNullWhen(true, nameof(State))]
    public bool HasState => State is not null;

    internal static CompletionResult Found(State state, string reason) => new(true, state, reason);

    internal static CompletionResult Impossible(string reason) => new(false, null, reason);

    internal static CompletionResult Unsettled(string reason) => new(null, null, reason);
}
