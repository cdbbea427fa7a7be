using System.Text;
using Fusecraft.Mechanisms;

namespace Fusecraft.Core.Tests.Mechanisms.Files;

public class BadMechanismFileTests
{
    [Theory]
    [MemberData(nameof(BadMechanismFiles.Cases), MemberType = typeof(BadMechanismFiles))]
    public void A_bad_file_is_refused_with_place_finding_and_cure(string what, string json, string problems)
    {
        Assert.NotEmpty(what);
        Assert.Equal(Lines(problems), ProblemsOf(Lines(json)));
    }

    [Fact]
    public void All_problems_of_a_file_are_reported_in_the_order_of_the_file()
    {
        const string file = """
            {
              "format": "fusecraft/mechanism/1",
              "about": 3,
              "sites": ["a", "b", "c", "a", "d e"],
              "pieces": [["a", "x"], "b"],
              "turns": {
                "A": { "moves": "(a b c)", "need": ["gap@a"], "needs": ["gap@z", 7, "pin@a"] },
                "B": { "moves": "(a b", "oneWay": true, "back": { "anyOf": [] } },
                "C": { "carries": ["b", "b"] },
                "A": { "moves": "(b c)" }
              },
              "blocks": [["a"], ["b", 4.5, "q"]],
              "marks": { "gap": ["b", "b"] },
              "goal": { "marks": ["gap@c", "gap"] },
              "colour": "faces"
            }
            """;

        Assert.Equal(
            """
            line 1, column 1, $.name: found no member "name"; every mechanism has a name
            line 3, column 12, $.about: found 3; should be a text in double quotes
            line 4, column 28, $.sites[3]: found "a" a second time; names are distinct
            line 4, column 33, $.sites[4]: found "d e"; a name is made of letters A-Z and a-z, digits, and the characters _ , : .
            line 5, column 20, $.pieces[0][1]: found "x"; should be the name of a site: a, b, c
            line 5, column 26, $.pieces[1]: found "b"; should be a list, each item the name of a site
            line 7, column 32, $.turns.A.need: found the unknown member "need"; did you mean "needs"? known here: moves, carries, needs, barredBy, anyOf, oneWay, back, as, backAs
            line 7, column 61, $.turns.A.needs[0]: found "z"; should be the name of a site: a, b, c
            line 7, column 70, $.turns.A.needs[1]: found 7; should be a mark and its site, such as "gap@4"
            line 7, column 73, $.turns.A.needs[2]: found mark "pin"; should be a declared mark: gap
            line 8, column 21, $.turns.B.moves: found "(a b"; should be disjoint cycles of sites (character 5: the text ends inside a cycle; ')' is missing)
            line 8, column 45, $.turns.B.back: found "back" beside "oneWay": true; a one-way turn has no backward step; leave one of the two out
            line 8, column 55, $.turns.B.back.anyOf: found an empty list; should hold at least one guard; leave it out when there is none
            line 9, column 5, $.turns.C.moves: found no member "moves"; every turn says what it moves, such as "(1 2 3)"
            line 9, column 29, $.turns.C.carries[1]: found piece "b" a second time; each piece is listed once
            line 10, column 5, $.turns.A: found a second member "A"; remove one of them
            line 12, column 14, $.blocks[0]: found a block of one piece; a block fuses two or more pieces
            line 12, column 27, $.blocks[1][1]: found 4.5; should be the name of a piece: a string or a whole number
            line 12, column 32, $.blocks[1][2]: found "q"; a block lists pieces, each by one of its sites or by its own name
            line 13, column 27, $.marks.gap[1]: found "b" a second time; a site holds at most one token of a mark
            line 14, column 32, $.goal.marks[1]: found "gap"; a mark at a site is written mark@site
            line 15, column 3, $.colour: found the unknown member "colour"; did you mean "colours"? known here: $schema, format, name, about, family, use, sites, pieces, turns, blocks, marks, goal, colours
            """,
            ProblemsOf(file));
    }

    [Fact]
    public void A_problem_has_its_parts_in_properties()
    {
        var problem = Assert.Single(Assert.Throws<MechanismFormatException>(() => MechanismFile.Parse("{\n  \"format\": 2 }")).Problems);

        Assert.Equal(new MechanismProblem("$.format", 2, 13, "2", "should be \"fusecraft/mechanism/1\", the only format known here"), problem);
    }

    [Fact]
    public void A_byte_that_is_no_utf8_is_located()
    {
        // "Tür" in ISO 8859-1.
        byte[] file = [.. "{ \"name\":\n  \"T"u8, 0xFC, .. "r\" }"u8];

        var exception = Assert.Throws<MechanismFormatException>(() => MechanismFile.Parse(file));

        Assert.Equal("line 2, column 5, $: found the byte 0xFC, which is no UTF-8 here; save the file in the encoding UTF-8", exception.Message);
    }

    [Fact]
    public void A_text_with_half_of_a_surrogate_pair_is_located() =>
        Assert.Equal("line 1, column 13, $: found half of a surrogate pair, U+D83D; should be well-formed Unicode text", ProblemsOf("{ \"name\": \"🚪\uD83D\" }"));

    [Fact]
    public void Lists_inside_one_another_end_at_a_limit()
    {
        const int limit = 64;
        var path = "$" + string.Concat(Enumerable.Repeat("[0]", limit));

        Assert.Equal(
            $"line 1, column {limit + 1}, {path}: found more than {limit} lists and objects inside one another; no mechanism needs more than {limit}",
            ProblemsOf(new string('[', 100_000)));
    }

    [Fact]
    public void A_byte_order_mark_is_skipped_and_not_counted()
    {
        byte[] file = [0xEF, 0xBB, 0xBF, .. "{ \"format\": 1 }"u8];

        var problem = Assert.Single(Assert.Throws<MechanismFormatException>(() => MechanismFile.Parse(file)).Problems);

        Assert.Equal((1, 13), (problem.Line, problem.Column));
    }

    [Fact]
    public void Lines_may_end_with_carriage_return_and_line_feed() =>
        Assert.StartsWith("line 3, column 1, $: found a comma before '}'", ProblemsOf("{\r\n  \"name\": \"Test\",\r\n}"), StringComparison.Ordinal);

    [Fact]
    public void Every_prefix_of_a_file_is_refused_with_one_problem_inside_the_text()
    {
        var text = GoodMechanismFiles.LockBasin;
        for (var length = 0; length < text.TrimEnd().Length; length++)
        {
            var bytes = Encoding.UTF8.GetBytes(text[..length]);
            var problem = Assert.Single(Assert.Throws<MechanismFormatException>(() => MechanismFile.Parse(bytes)).Problems);
            var lines = text[..length].Split('\n');
            Assert.InRange(problem.Line!.Value, 1, lines.Length);
            Assert.InRange(problem.Column!.Value, 1, lines[problem.Line.Value - 1].Length + 1);
        }
    }

    private static string ProblemsOf(string json) =>
        Assert.Throws<MechanismFormatException>(() => MechanismFile.Parse(json)).Message.ReplaceLineEndings("\n");

    private static string Lines(string text) => text.Replace('⏎', '\n').Replace('⇥', '\t');
}
