using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

internal sealed partial class MechanismReader
{
    private const string MarkAtSite = "a mark and its site, such as \"gap@4\"";

    private ImmutableArray<TurnDefinition> Turns(LocatedJson? json)
    {
        if (!IsObjectOrAbsent(json, "should be an object of turns: { \"A\": { \"moves\": \"(1 2 3)\" } }"))
        {
            return [];
        }

        // Turns are known by name, so one that cannot be read may be left out.
        return [.. json.Children.Where(turn => IsObjectOrAbsent(turn, "should be an object: { \"moves\": \"(1 2 3)\" }")).Select(Turn)];
    }

    private TurnDefinition Turn(LocatedJson json)
    {
        RequireKnown(json, "moves", "carries", "needs", "barredBy", "anyOf", "oneWay", "back", "as", "backAs");
        return new TurnDefinition
        {
            Name = json.Name!,
            Moves = String(Required(json, "moves", "every turn says what it moves, such as \"(1 2 3)\"")) ?? "",
            Carries = Names(json.Member("carries"), "piece"),
            Guard = GuardMembers(json),
            IsOneWay = Boolean(json.Member("oneWay")),
            Back = json.Member("back") is { } back ? Guard(back) : null,
            As = String(json.Member("as")),
            BackAs = String(json.Member("backAs")),
        };
    }

    private GuardDefinition Guard(LocatedJson json)
    {
        if (!IsObjectOrAbsent(json, "should be a guard: { \"needs\": [ … ], \"barredBy\": [ … ], \"anyOf\": [ … ] }"))
        {
            return GuardDefinition.Always;
        }

        RequireKnown(json, "needs", "barredBy", "anyOf");
        return GuardMembers(json);
    }

    private GuardDefinition GuardMembers(LocatedJson json) => new()
    {
        Needs = Strings(json.Member("needs"), MarkAtSite),
        BarredBy = Strings(json.Member("barredBy"), MarkAtSite),
        AnyOf = AnyOf(json.Member("anyOf")),
    };

    private ImmutableArray<GuardDefinition> AnyOf(LocatedJson? json)
    {
        if (!IsListOrAbsent(json, "should be a list of guards: [{ \"needs\": [ … ] }, { \"barredBy\": [ … ] }]"))
        {
            return [];
        }

        RequireItems(json, "should hold at least one guard; leave it out when there is none");
        return [.. json.Children.Select(Guard)];
    }
}
