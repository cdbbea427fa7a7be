namespace Fusecraft.Mechanisms;

/// <summary>Writes down what there is to a turn besides what it moves. See <see cref="TurnDefinition"/>.</summary>
public sealed class TurnBuilder
{
    private readonly string _name;
    private readonly string _moves;
    private readonly GuardBuilder _guard = new();
    private readonly List<string> _carries = [];
    private bool _isOneWay;
    private GuardDefinition? _back;
    private string? _as;
    private string? _backAs;

    internal TurnBuilder(string name, string moves)
    {
        _name = name;
        _moves = moves;
    }

    /// <inheritdoc cref="GuardBuilder.Needs"/>
    public TurnBuilder Needs(params IEnumerable<string> marks)
    {
        _guard.Needs(marks);
        return this;
    }

    /// <inheritdoc cref="GuardBuilder.BarredBy"/>
    public TurnBuilder BarredBy(params IEnumerable<string> marks)
    {
        _guard.BarredBy(marks);
        return this;
    }

    /// <inheritdoc cref="GuardBuilder.AnyOf"/>
    public TurnBuilder AnyOf(params ReadOnlySpan<Action<GuardBuilder>> guards)
    {
        _guard.AnyOf(guards);
        return this;
    }

    /// <inheritdoc cref="GuardBuilder.When"/>
    public TurnBuilder When(Func<Shape, bool> condition)
    {
        _guard.When(condition);
        return this;
    }

    /// <summary>These pieces come along although the turn moves none of their sites.</summary>
    /// <param name="pieces">Names of pieces.</param>
    public TurnBuilder Carries(params IEnumerable<string> pieces)
    {
        _carries.AddRange(pieces);
        return this;
    }

    /// <summary>There is no backward step.</summary>
    public TurnBuilder OneWay()
    {
        _isOneWay = true;
        return this;
    }

    /// <summary>The backward step has a guard of its own, instead of being free exactly to undo a free forward step.</summary>
    /// <param name="guard">Writes the guard down; one that writes nothing makes the step always free.</param>
    public TurnBuilder Back(Action<GuardBuilder> guard)
    {
        _back = GuardBuilder.Describe(guard);
        return this;
    }

    /// <summary>How the steps are written in words.</summary>
    /// <param name="forward">The name of the forward step.</param>
    /// <param name="backward">The name of the backward step; null for the forward step's name followed by <c>'</c>.</param>
    public TurnBuilder WrittenAs(string forward, string? backward = null)
    {
        _as = forward;
        _backAs = backward;
        return this;
    }

    internal TurnDefinition ToDefinition() => new()
    {
        Name = _name,
        Moves = _moves,
        Carries = [.. _carries],
        Guard = _guard.ToDefinition(),
        IsOneWay = _isOneWay,
        Back = _back,
        As = _as,
        BackAs = _backAs,
    };
}
