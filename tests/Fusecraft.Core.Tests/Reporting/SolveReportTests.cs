using Fusecraft.Reporting;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Reporting;

public class SolveReportTests
{
    [Fact]
    public void A_path_is_given_as_word_and_length()
    {
        var board = Make.Board(3, 2);

        var result = new Solver(board).Solve(board.ParseState("R D L"));

        Assert.Equal(
            """{"solvable":true,"word":"R U L","length":3,"provenShortest":true,"reason":"A search over all shorter paths found none."}""",
            SolveReport.ToJson(result));
    }

    [Fact]
    public void A_path_without_steps_has_an_empty_word()
    {
        var board = Make.Board(3, 2);

        var json = SolveReport.ToJson(new Solver(board).Solve(board.HomeState));

        Assert.StartsWith("""{"solvable":true,"word":"","length":0,"provenShortest":true,"reason":""", json, StringComparison.Ordinal);
    }

    [Fact]
    public void A_proof_that_there_is_no_path_leaves_word_and_length_null()
    {
        var board = Make.Board(3, 2);

        var json = SolveReport.ToJson(new Solver(board).Solve(board.ParseState("(1 2)")));

        Assert.StartsWith("""{"solvable":false,"word":null,"length":null,"provenShortest":false,"reason":""", json, StringComparison.Ordinal);
    }

    [Fact]
    public void An_ended_budget_leaves_open_whether_there_is_a_path() => Assert.Equal(
        """{"solvable":null,"word":null,"length":null,"provenShortest":false,"reason":"It ended."}""",
        SolveReport.ToJson(SolveResult.Unsettled("It ended.")));

    [Fact]
    public void Without_a_result_there_is_nothing_to_report() => Assert.Throws<ArgumentNullException>(() => SolveReport.ToJson(null!));
}
