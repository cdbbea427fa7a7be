using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

public sealed partial class BoardFamily
{
    /// <inheritdoc/>
    internal override Blueprint? Expand(ProblemList problems)
    {
        if (Columns < 1)
        {
            problems.Add("$.family.columns", $"{Columns}", "a board has at least 1 column");
        }

        if (Rows < 1)
        {
            problems.Add("$.family.rows", $"{Rows}", "a board has at least 1 row");
        }

        if (Columns < 1 || Rows < 1)
        {
            return null;
        }

        if ((long)Columns * Rows > Permutation.MaxDegree)
        {
            problems.Add("$.family", $"{(long)Columns * Rows} cells", $"a board has at most {Permutation.MaxDegree} cells");
            return null;
        }

        var edges = new List<SlidingEdge>();
        for (var cell = 0; cell < Columns * Rows; cell++)
        {
            if ((cell + 1) % Columns != 0)
            {
                edges.Add(new SlidingEdge(cell, cell + 1, $"{cell + 1}:{cell + 2}", "L", "R"));
            }

            if (cell + Columns < Columns * Rows)
            {
                edges.Add(new SlidingEdge(cell, cell + Columns, $"{cell + 1}:{cell + 1 + Columns}", "U", "D"));
            }
        }

        return SlidingEdge.ToBlueprint(Blueprint.NumberedNames(Columns * Rows), edges, Gaps, problems, Symmetries);
    }
}
