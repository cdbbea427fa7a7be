using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>Lays a definition out as the text of a mechanism file: members in the order of the reference page, defaults left out.</summary>
internal static class MechanismWriter
{
    internal static string Write(MechanismDefinition definition)
    {
        if (definition.Turns.FirstOrDefault(turn => turn.Guard.HasCode || turn.Back is { HasCode: true }) is { } coded)
        {
            throw new NotSupportedException($"Turn {coded.Name} has a guard written in code, which a file cannot hold.");
        }

        var file = JsonLayout.Object();
        Text(file, "$schema", definition.Schema);
        Text(file, "format", MechanismFile.Format);
        Text(file, "name", definition.Name);
        Text(file, "about", definition.About);
        if (definition.Family is { } family)
        {
            file.With("family", Family(family));
            Names(file, "use", definition.Use);
        }
        else
        {
            file.With("sites", CountOrNames(definition.Sites));
            Lists(file, "pieces", definition.Pieces);
            file.With("turns", Turns(definition.Turns));
        }

        Lists(file, "blocks", definition.Blocks);
        Marks(file, definition.Marks);
        Goal(file, definition.Goal);
        Colours(file, definition.Colours);
        return file.ToText();
    }

    private static JsonLayout Family(MechanismFamily family)
    {
        var json = JsonLayout.Object().With("kind", JsonLayout.String(family.Kind));
        switch (family)
        {
            case CubeFamily cube:
                json.With("size", JsonLayout.Number(cube.Size));
                True(json, "centreTwist", cube.CentreTwist);
                break;
            case BoardFamily board:
                json.With("columns", JsonLayout.Number(board.Columns)).With("rows", JsonLayout.Number(board.Rows));
                Names(json, "gaps", board.Gaps);
                break;
            case GraphBoardFamily graph:
                json.With("vertices", CountOrNames(graph.Vertices));
                json.With("edges", JsonLayout.List(graph.Edges.Select(edge => JsonLayout.Strings([edge.From, edge.To]))));
                Names(json, "gaps", graph.Gaps);
                break;
        }

        return json;
    }

    private static JsonLayout Turns(ImmutableArray<TurnDefinition> turns)
    {
        var json = JsonLayout.Object();
        foreach (var turn in turns)
        {
            json.With(turn.Name, Turn(turn));
        }

        return json;
    }

    private static JsonLayout Turn(TurnDefinition turn)
    {
        var json = JsonLayout.Object().With("moves", JsonLayout.String(turn.Moves));
        Names(json, "carries", turn.Carries);
        Guard(json, turn.Guard);
        True(json, "oneWay", turn.IsOneWay);
        if (turn.Back is { } back)
        {
            json.With("back", Guard(JsonLayout.Object(), back));
        }

        Text(json, "as", turn.As);
        Text(json, "backAs", turn.BackAs);
        return json;
    }

    private static JsonLayout Guard(JsonLayout json, GuardDefinition guard)
    {
        Names(json, "needs", guard.Needs);
        Names(json, "barredBy", guard.BarredBy);
        if (!guard.AnyOf.IsDefaultOrEmpty)
        {
            json.With("anyOf", JsonLayout.List(guard.AnyOf.Select(any => Guard(JsonLayout.Object(), any))));
        }

        return json;
    }

    private static void Marks(JsonLayout file, ImmutableArray<MarkDefinition> marks)
    {
        if (!marks.IsDefaultOrEmpty)
        {
            var json = JsonLayout.Object();
            foreach (var mark in marks)
            {
                json.With(mark.Name, JsonLayout.Strings(mark.Sites));
            }

            file.With("marks", json);
        }
    }

    private static void Goal(JsonLayout file, Goal goal)
    {
        switch (goal.Kind)
        {
            case GoalKind.Shape:
                Text(file, "goal", "shape");
                break;
            case GoalKind.Colours:
                Text(file, "goal", "colours");
                break;
            case GoalKind.Marks:
                file.With("goal", JsonLayout.Object().With("marks", JsonLayout.Strings(goal.Names)));
                break;
            case GoalKind.Sites:
                file.With("goal", JsonLayout.Object().With("sites", JsonLayout.Strings(goal.Names)));
                break;
        }
    }

    private static void Colours(JsonLayout file, ColourScheme colours)
    {
        switch (colours.Kind)
        {
            case ColourSchemeKind.Faces:
                Text(file, "colours", "faces");
                break;
            case ColourSchemeKind.Alike:
                file.With("colours", JsonLayout.List(colours.AlikeSites.Select(list => JsonLayout.Strings(list))));
                break;
        }
    }

    private static JsonLayout CountOrNames(ImmutableArray<string> names) =>
        names.Length > 0 && names.SequenceEqual(Blueprint.NumberedNames(names.Length)) ? JsonLayout.Number(names.Length) : JsonLayout.Strings(names);

    private static void Text(JsonLayout json, string name, string? text)
    {
        if (text is not null)
        {
            json.With(name, JsonLayout.String(text));
        }
    }

    private static void True(JsonLayout json, string name, bool value)
    {
        if (value)
        {
            json.With(name, JsonLayout.True);
        }
    }

    private static void Names(JsonLayout json, string name, ImmutableArray<string> names)
    {
        if (!names.IsDefaultOrEmpty)
        {
            json.With(name, JsonLayout.Strings(names));
        }
    }

    private static void Lists(JsonLayout json, string name, ImmutableArray<ImmutableArray<string>> lists)
    {
        if (!lists.IsDefaultOrEmpty)
        {
            json.With(name, JsonLayout.List(lists.Select(list => JsonLayout.Strings(list))));
        }
    }
}
