using System.Text.Json;
using System.Text.Json.Nodes;
using Fusecraft.Mechanisms;
using Json.Schema;

namespace Fusecraft.Core.Tests.Mechanisms.Files;

public class MechanismSchemaTests
{
    [Fact]
    public void The_schema_is_valid_itself()
    {
        var schema = JsonDocument.Parse(MechanismFile.Schema).RootElement;

        Assert.True(MetaSchemas.Draft202012.Evaluate(schema).IsValid);
        Assert.Equal("urn:fusecraft:mechanism:1", schema.GetProperty("$id").GetString());
    }

    [Theory]
    [MemberData(nameof(GoodMechanismFiles.Cases), MemberType = typeof(GoodMechanismFiles))]
    public void Good_files_pass(string what, string json) => Assert.True(SchemaCheck.Passes(json), what);

    [Theory]
    [MemberData(nameof(GoodMechanismFiles.Cases), MemberType = typeof(GoodMechanismFiles))]
    public void Written_files_pass(string what, string json) => Assert.True(SchemaCheck.Passes(MechanismFile.Write(MechanismFile.Parse(json))), what);

    [Theory]
    [MemberData(nameof(GoodMechanismFiles.Cases), MemberType = typeof(GoodMechanismFiles))]
    public void No_object_of_fixed_members_takes_another_one(string what, string json)
    {
        foreach (var path in FixedObjects(JsonNode.Parse(json)!))
        {
            var changed = JsonNode.Parse(json)!;
            path(changed)["another"] = 1;

            Assert.False(SchemaCheck.Passes(changed.ToJsonString()), what);
            Assert.Throws<MechanismFormatException>(() => MechanismFile.Parse(changed.ToJsonString()));
        }
    }

    [Theory]
    [InlineData("""[]""")]
    [InlineData("""{ "name": "Test", "sites": 1, "turns": {} }""")]
    [InlineData("""{ "format": "fusecraft/mechanism/2", "name": "Test", "sites": 1, "turns": {} }""")]
    [InlineData("""{ "format": "fusecraft/mechanism/1", "sites": 1, "turns": {} }""")]
    [InlineData("""{ "format": "fusecraft/mechanism/1", "name": " ", "sites": 1, "turns": {} }""")]
    [InlineData("""{ "format": "fusecraft/mechanism/1", "name": "Test" }""")]
    [InlineData("""{ "format": "fusecraft/mechanism/1", "name": "Test", "sites": 1 }""")]
    [InlineData("""{ "format": "fusecraft/mechanism/1", "name": "Test", "turns": {} }""")]
    [InlineData("""{ "format": "fusecraft/mechanism/1", "name": "Test", "sites": 1, "turns": {}, "use": ["U"] }""")]
    [InlineData("""{ "format": "fusecraft/mechanism/1", "name": "Test", "sites": 1, "turns": {}, "family": { "kind": "cube", "size": 3 } }""")]
    public void Files_of_the_wrong_frame_fail(string json)
    {
        Assert.False(SchemaCheck.Passes(json));
        Assert.Throws<MechanismFormatException>(() => MechanismFile.Parse(json));
    }

    [Theory]
    [InlineData("""{ "kind": "ring" }""")]
    [InlineData("""{ "kind": "cube" }""")]
    [InlineData("""{ "kind": "cube", "size": 1 }""")]
    [InlineData("""{ "kind": "cube", "size": 101 }""")]
    [InlineData("""{ "kind": "cube", "size": "3" }""")]
    [InlineData("""{ "kind": "cube", "size": 3, "centreTwist": 1 }""")]
    [InlineData("""{ "kind": "board", "columns": 3 }""")]
    [InlineData("""{ "kind": "board", "columns": 3, "rows": 0 }""")]
    [InlineData("""{ "kind": "board", "columns": 3, "rows": 3, "gaps": [] }""")]
    [InlineData("""{ "kind": "board", "columns": 3, "rows": 3, "gaps": 9 }""")]
    [InlineData("""{ "kind": "graph-board", "vertices": 3 }""")]
    [InlineData("""{ "kind": "graph-board", "vertices": 0, "edges": [] }""")]
    [InlineData("""{ "kind": "graph-board", "vertices": ["a", "a"], "edges": [] }""")]
    [InlineData("""{ "kind": "graph-board", "vertices": 3, "edges": [["1"]] }""")]
    public void Families_of_the_wrong_form_fail(string family)
    {
        var json = $$"""{ "format": "fusecraft/mechanism/1", "name": "Test", "family": {{family}} }""";

        Assert.False(SchemaCheck.Passes(json));
        Assert.Throws<MechanismFormatException>(() => MechanismFile.Parse(json));
    }

    [Theory]
    [InlineData("""{ }""")]
    [InlineData("""{ "moves": 1 }""")]
    [InlineData("""{ "moves": "1 2" }""")]
    [InlineData("""{ "moves": "(1 2)", "carries": "2" }""")]
    [InlineData("""{ "moves": "(1 2)", "carries": ["two pieces"] }""")]
    [InlineData("""{ "moves": "(1 2)", "needs": ["gap"] }""")]
    [InlineData("""{ "moves": "(1 2)", "needs": [1] }""")]
    [InlineData("""{ "moves": "(1 2)", "barredBy": "gap@1" }""")]
    [InlineData("""{ "moves": "(1 2)", "anyOf": [] }""")]
    [InlineData("""{ "moves": "(1 2)", "anyOf": [[]] }""")]
    [InlineData("""{ "moves": "(1 2)", "oneWay": 1 }""")]
    [InlineData("""{ "moves": "(1 2)", "oneWay": true, "back": {} }""")]
    [InlineData("""{ "moves": "(1 2)", "back": [] }""")]
    [InlineData("""{ "moves": "(1 2)", "as": 1 }""")]
    public void Turns_of_the_wrong_form_fail(string turn)
    {
        var json = $$"""{ "format": "fusecraft/mechanism/1", "name": "Test", "sites": 2, "marks": { "gap": ["1"] }, "turns": { "A": {{turn}} } }""";

        Assert.False(SchemaCheck.Passes(json));
        Assert.Throws<MechanismFormatException>(() => MechanismFile.Parse(json));
    }

    [Theory]
    [InlineData(""" "blocks": [["1"]] """)]
    [InlineData(""" "blocks": [["1", "1"]] """)]
    [InlineData(""" "blocks": ["1", "2"] """)]
    [InlineData(""" "blocks": [["1", -2]] """)]
    [InlineData(""" "pieces": ["1"] """)]
    [InlineData(""" "marks": { "gap": [] } """)]
    [InlineData(""" "marks": { "g p": ["1"] } """)]
    [InlineData(""" "marks": ["gap"] """)]
    [InlineData(""" "goal": "solved" """)]
    [InlineData(""" "goal": { } """)]
    [InlineData(""" "goal": { "sites": [] } """)]
    [InlineData(""" "goal": { "marks": ["gap"] } """)]
    [InlineData(""" "colours": "face" """)]
    [InlineData(""" "colours": ["1"] """)]
    [InlineData(""" "about": 1 """)]
    public void Members_of_the_wrong_form_fail(string member)
    {
        var json = $$"""{ "format": "fusecraft/mechanism/1", "name": "Test", "sites": 2, "turns": { "A": { "moves": "(1 2)" } }, {{member}} }""";

        Assert.False(SchemaCheck.Passes(json));
        Assert.Throws<MechanismFormatException>(() => MechanismFile.Parse(json));
    }

    /// <summary>Ways from the root to each object whose members the format names: all but the tables of turns and marks.</summary>
    private static IEnumerable<Func<JsonNode, JsonNode>> FixedObjects(JsonNode node, string name = "")
    {
        if (node is JsonObject members)
        {
            if (name is not ("turns" or "marks"))
            {
                yield return static here => here;
            }

            foreach (var (key, value) in members)
            {
                foreach (var inner in FixedObjects(value!, name is "turns" or "marks" ? "" : key))
                {
                    yield return here => inner(here[key]!);
                }
            }
        }
        else if (node is JsonArray items)
        {
            for (var i = 0; i < items.Count; i++)
            {
                var index = i;
                foreach (var inner in FixedObjects(items[i]!))
                {
                    yield return here => inner(here[index]!);
                }
            }
        }
    }
}
