namespace Fusecraft.Mechanisms;

/// <summary>Writes down a guard: the marks a step needs, those that bar it, and alternatives. See <see cref="GuardDefinition"/>.</summary>
public sealed class GuardBuilder
{
    private readonly List<string> _needs = [];
    private readonly List<string> _barredBy = [];
    private readonly List<GuardDefinition> _anyOf = [];

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

    internal static GuardDefinition Describe(Action<GuardBuilder> describe)
    {
        ArgumentNullException.ThrowIfNull(describe);
        var guard = new GuardBuilder();
        describe(guard);
        return guard.ToDefinition();
    }

    internal GuardDefinition ToDefinition() => new() { Needs = [.. _needs], BarredBy = [.. _barredBy], AnyOf = [.. _anyOf] };
}
