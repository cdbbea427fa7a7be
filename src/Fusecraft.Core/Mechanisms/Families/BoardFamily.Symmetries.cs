using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

public sealed partial class BoardFamily
{
    // The plane symmetries of the rectangle as permutations of the cells, the identity first.
    private ImmutableArray<Permutation> Symmetries()
    {
        var all = new List<Permutation>();
        foreach (var transposed in Columns == Rows ? (bool[])[false, true] : [false])
        {
            foreach (var (across, down) in ((bool, bool)[])[(false, false), (true, true), (true, false), (false, true)])
            {
                var images = new int[Columns * Rows];
                for (var cell = 0; cell < images.Length; cell++)
                {
                    var column = across ? Columns - 1 - (cell % Columns) : cell % Columns;
                    var row = down ? Rows - 1 - (cell / Columns) : cell / Columns;
                    images[cell] = transposed ? (column * Columns) + row : (row * Columns) + column;
                }

                all.Add(Permutation.FromTrustedImages<int>(images));
            }
        }

        return [.. all.Distinct()];
    }
}
