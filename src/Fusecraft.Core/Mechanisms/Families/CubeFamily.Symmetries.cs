using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

public sealed partial class CubeFamily
{
    private sealed partial class Layout
    {
        private static readonly (int First, int Second, int Third, bool IsEven)[] AxisOrders =
            [(0, 1, 2, true), (1, 2, 0, true), (2, 0, 1, true), (0, 2, 1, false), (2, 1, 0, false), (1, 0, 2, false)];

        // The 24 rotations of the cube, the identity first, then its 24 reflections and rotary reflections, as permutations of the sites.
        private ImmutableArray<Permutation> Symmetries()
        {
            var rotations = ImmutableArray.CreateBuilder<Permutation>(48);
            var reflections = ImmutableArray.CreateBuilder<Permutation>(24);
            foreach (var (first, second, third, isEven) in AxisOrders)
            {
                for (var signs = 0; signs < 8; signs++)
                {
                    var isRotation = isEven == (int.PopCount(signs) % 2 == 0);
                    (isRotation ? rotations : reflections).Add(SitesMoved(Move));

                    (int X, int Y, int Z) Move((int X, int Y, int Z) p)
                    {
                        ReadOnlySpan<int> from = [p.X, p.Y, p.Z];
                        return (Sign(0) * from[first], Sign(1) * from[second], Sign(2) * from[third]);
                    }

                    int Sign(int axis) => (signs >> axis & 1) == 0 ? 1 : -1;
                }
            }

            rotations.AddRange(reflections);
            return rotations.ToImmutable();
        }

        private Permutation SitesMoved(Func<(int X, int Y, int Z), (int X, int Y, int Z)> move)
        {
            var images = new int[_sites.Count];
            for (var site = 0; site < images.Length; site++)
            {
                var (piece, side, corner) = _sites[site];
                var target = _pieceAt[FromCentred(move(ToCentred(_cells[piece])))];
                var newSide = Array.IndexOf(Normals, move(Normals[side]));
                images[site] = _siteAt[(target, newSide, corner < 0 ? 0 : CornerAt(newSide, move(CornerOf(side, corner))))];
            }

            return Permutation.FromTrustedImages<int>(images);
        }

        // The direction, within its face, in which a corner site of a twisting face centre lies. Which one is the first does not matter, only that they follow each other clockwise.
        private static (int X, int Y, int Z) CornerOf(int face, int corner)
        {
            var direction = (face / 2) switch { 0 => (0, 1, 1), 1 => (1, 0, 1), _ => (1, 1, 0) };
            for (; corner > 0; corner--)
            {
                direction = Rotate(direction, face);
            }

            return direction;
        }

        private static int CornerAt(int face, (int X, int Y, int Z) direction) => Enumerable.Range(0, 4).First(corner => CornerOf(face, corner) == direction);
    }
}
