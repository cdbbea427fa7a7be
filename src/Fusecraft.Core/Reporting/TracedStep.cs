using System.Text;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Reporting;

/// <summary>A step that was done, and the shape it led to.</summary>
/// <param name="Step">The step.</param>
/// <param name="Shape">The shape after it.</param>
public sealed record TracedStep(Step Step, Shape Shape)
{
    /// <summary>
    /// What the step moved: cycles of the places of pieces, named as the pieces at home there, such as <c>(UFR UFL UBL UBR)</c>; then, after <c>turned in place:</c>, the pieces whose sites
    /// it moved among themselves.
    /// </summary>
    public string Moved
    {
        get
        {
            var mechanism = Shape.Mechanism;
            var images = new int[mechanism.PieceCount];
            var inPlace = new List<string>();
            for (var piece = 0; piece < images.Length; piece++)
            {
                var sites = mechanism.SitesOfPiece[piece];
                images[piece] = sites.IsEmpty ? piece : mechanism.PieceOfSite[Step.Permutation[sites[0]]];
                if (images[piece] == piece && sites.Any(site => Step.Permutation[site] != site))
                {
                    inPlace.Add(mechanism.PieceNames[piece]);
                }
            }

            var text = new StringBuilder();
            foreach (var cycle in Permutation.FromImages(images).Cycles())
            {
                text.Append('(').AppendJoin(' ', cycle.Select(piece => mechanism.PieceNames[piece])).Append(')');
            }

            if (inPlace.Count > 0)
            {
                text.Append(text.Length > 0 ? "; " : "").Append("turned in place: ").AppendJoin(' ', inPlace);
            }

            return text.ToString();
        }
    }
}
