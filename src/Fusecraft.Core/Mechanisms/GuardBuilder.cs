namespace Fusecraft.Mechanisms;

/// <summary>Writes down a guard: the marks a step needs, those that bar it, alternatives, conditions in code. See <see cref="GuardDefinition"/>.</summary>
public sealed class GuardBuilder
{
    private readonly List<string> _needs = [];
    private readonly List<string> _barredBy = [];
    private readonly List<GuardDefinition> _anyOf = [];
    private Func<Shape, bool>? _when;

    internal GuardBuilder()
    {
    }

    /// <summary>All of these must be there.</summary>
    /// <param name="marks">Marks as <c>mark@site</c>.</param>
    public GuardBuilder Needs(params IEnumerable<string> marks)
    {
        _needs.AddRange(marks);
        return this;
    }

    /// <summary>None of these may be there.</summary>
    /// <param name="marks">Marks as <c>mark@site</c>.</param>
    public GuardBuilder BarredBy(params IEnumerable<string> marks)
    {
        _barredBy.AddRange(marks);
        return this;
    }

    /// <summary>At least one of these guards, and of those of further calls, must hold.</summary>
    /// <param name="guards">Each writes down one guard.</param>
    public GuardBuilder AnyOf(params ReadOnlySpan<Action<GuardBuilder>> guards)
    {
        foreach (var guard in guards)
        {
            _anyOf.Add(Describe(guard));
        }

        return this;
    }

    /// <summary>This must hold too, and what further calls name: a condition in code on the shape where the step starts.</summary>
    /// <param name="condition">
    /// Says whether the step may be done as far as this condition goes; blocks that the step would tear bar it all the same. It must be pure: the same answer for the same shape whenever and on
    /// whichever thread it is asked. A backward step without a guard of its own stays free exactly where it undoes a free forward step: then the condition is asked about the shape it leads to.
    /// </param>
    /// <remarks>
    /// A mechanism with such a guard is explored with the same results as with marks, only slower, and cannot be written to a file. Where marks and blocks can ever come is worked out as if
    /// every guard held, so the condition may be asked about shapes that no path from home reaches.
    /// </remarks>
    public GuardBuilder When(Func<Shape, bool> condition)
    {
        ArgumentNullException.ThrowIfNull(condition);
        var before = _when;
        _when = before is null ? condition : shape => before(shape) && condition(shape);
        return this;
    }

    internal static GuardDefinition Describe(Action<GuardBuilder> describe)
    {
        ArgumentNullException.ThrowIfNull(describe);
        var guard = new GuardBuilder();
        describe(guard);
        return guard.ToDefinition();
    }

    internal GuardDefinition ToDefinition() => new() { Needs = [.. _needs], BarredBy = [.. _barredBy], AnyOf = [.. _anyOf], When = _when };
}
