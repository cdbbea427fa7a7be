using System.Collections.Immutable;
using System.Globalization;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

public sealed partial class CubeFamily
{
    // The order in which a piece's facelets are numbered.
    private const string FaceOrder = "LRDUBF";

    // The order in which a piece's own name is written.
    private const string NameOrder = "UDFBRL";

    // Unit vectors of the faces in the order of FaceOrder; x to the right, y up, z to the viewer.
    private static readonly (int X, int Y, int Z)[] Normals = [(-1, 0, 0), (1, 0, 0), (0, -1, 0), (0, 1, 0), (0, 0, -1), (0, 0, 1)];

    /// <inheritdoc/>
    internal override Blueprint? Expand(ProblemList problems)
    {
        if (Size is < 2 or > 100)
        {
            problems.Add("$.family.size", $"{Size}", "a cube has 2 to 100 layers a side");
            return null;
        }

        if (CentreTwist && Size % 2 == 0)
        {
            problems.Add("$.family.centreTwist", $"true with size {Size}", "only cubes of odd size have face centres; leave it out");
            return null;
        }

        return new Layout(Size, CentreTwist).ToBlueprint();
    }

    /// <summary>The name of the turn of the first layers seen from a face.</summary>
    internal static string TurnName(char face, int layers) => layers switch
    {
        1 => $"{face}",
        2 => $"{face}w",
        _ => $"{layers}{face}w",
    };

    /// <summary>The numbering of one cube: which sites and pieces there are and where a turn takes them.</summary>
    private sealed partial class Layout
    {
        private readonly int _size;
        private readonly List<(int X, int Y, int Z)> _cells = [];
        private readonly Dictionary<(int X, int Y, int Z), int> _pieceAt = [];
        private readonly List<(int Piece, int Face, int Corner)> _sites = [];
        private readonly Dictionary<(int Piece, int Face, int Corner), int> _siteAt = [];
        private readonly Dictionary<string, int> _pieceByLetters = [];
        private readonly int? _core;

        public Layout(int size, bool centreTwist)
        {
            _size = size;
            var middle = (size + 1) / 2;
            foreach (var x in Enumerable.Range(1, size))
            {
                foreach (var y in Enumerable.Range(1, size))
                {
                    foreach (var z in Enumerable.Range(1, size))
                    {
                        var faces = FacesOf((x, y, z));
                        if (faces.Count == 0)
                        {
                            continue;
                        }

                        var piece = _cells.Count;
                        _cells.Add((x, y, z));
                        _pieceAt.Add((x, y, z), piece);
                        if (size <= 3)
                        {
                            _pieceByLetters.Add(Letters(faces), piece);
                        }

                        var isCentre = faces.Count == 1 && size % 2 == 1 && IsCentre((x, y, z), middle);
                        foreach (var face in faces)
                        {
                            for (var corner = 0; corner < (isCentre && centreTwist ? 4 : 1); corner++)
                            {
                                _siteAt.Add((piece, face, corner), _sites.Count);
                                _sites.Add((piece, face, isCentre && centreTwist ? corner : -1));
                            }
                        }
                    }
                }
            }

            _core = size % 2 == 1 ? _cells.Count : null;
        }

        public Blueprint ToBlueprint()
        {
            var pieceNames = _cells.Select(NameOf).ToList();
            if (_core is not null)
            {
                pieceNames.Add("core");
            }

            return new Blueprint
            {
                SiteNames = [.. _sites.Select(SiteName)],
                SiteAlias = FindSite,
                PieceOfSite = [.. _sites.Select(site => site.Piece)],
                PieceNames = [.. pieceNames],
                PieceAlias = FindPiece,
                Adjacency = Adjacency(),
                Symmetries = Symmetries,
                Faces = [.. _sites.Select(site => site.Face)],
                FaceNames = [.. FaceOrder.Select(face => $"{face}")],
                Turns = [.. Turns()],
            };
        }

        private List<int> FacesOf((int X, int Y, int Z) cell)
        {
            var faces = new List<int>(3);
            int[] coordinates = [cell.X, cell.Y, cell.Z];
            for (var axis = 0; axis < 3; axis++)
            {
                if (coordinates[axis] == 1)
                {
                    faces.Add(2 * axis);
                }
                else if (coordinates[axis] == _size)
                {
                    faces.Add((2 * axis) + 1);
                }
            }

            return faces;
        }

        private static bool IsCentre((int X, int Y, int Z) cell, int middle) =>
            (cell.X == middle ? 1 : 0) + (cell.Y == middle ? 1 : 0) + (cell.Z == middle ? 1 : 0) == 2;

        private static string Letters(IEnumerable<int> faces) => string.Concat(faces.Select(face => FaceOrder[face]).OrderBy(letter => NameOrder.IndexOf(letter, StringComparison.Ordinal)));

        private string NameOf((int X, int Y, int Z) cell) => _size <= 3 ? Letters(FacesOf(cell)) : $"{cell.X},{cell.Y},{cell.Z}";

        private string SiteName((int Piece, int Face, int Corner) site)
        {
            var name = $"{NameOf(_cells[site.Piece])}:{FaceOrder[site.Face]}";
            return site.Corner < 0 ? name : $"{name}.{site.Corner + 1}";
        }

        private int? FindPiece(string name)
        {
            if (name == "core")
            {
                return _core;
            }

            var numbers = name.Split(',');
            if (numbers.Length == 3
                && int.TryParse(numbers[0], NumberStyles.None, CultureInfo.InvariantCulture, out var x)
                && int.TryParse(numbers[1], NumberStyles.None, CultureInfo.InvariantCulture, out var y)
                && int.TryParse(numbers[2], NumberStyles.None, CultureInfo.InvariantCulture, out var z))
            {
                return _pieceAt.TryGetValue((x, y, z), out var piece) ? piece : null;
            }

            var letters = string.Concat(name.OrderBy(letter => NameOrder.IndexOf(letter, StringComparison.Ordinal)));
            return _pieceByLetters.TryGetValue(letters, out var found) ? found : null;
        }

        private int? FindSite(string name)
        {
            var colon = name.LastIndexOf(':');
            if (colon < 0 || FindPiece(name[..colon]) is not { } piece || colon + 1 >= name.Length)
            {
                return null;
            }

            var corner = name.Length > colon + 2 && name[colon + 2] == '.' && name.Length == colon + 4 ? name[colon + 3] - '1' : 0;
            if (name.Length != colon + 2 && name.Length != colon + 4)
            {
                return null;
            }

            var face = FaceOrder.IndexOf(name[colon + 1], StringComparison.Ordinal);
            return _siteAt.TryGetValue((piece, face, corner), out var site) && (_sites[site].Corner >= 0) == (name.Length == colon + 4) ? site : null;
        }

        private List<(int A, int B)> Adjacency()
        {
            var pairs = new List<(int, int)>();
            for (var piece = 0; piece < _cells.Count; piece++)
            {
                var (x, y, z) = _cells[piece];
                foreach (var neighbour in ((int, int, int)[])[(x + 1, y, z), (x, y + 1, z), (x, y, z + 1)])
                {
                    if (_pieceAt.TryGetValue(neighbour, out var other))
                    {
                        pairs.Add((piece, other));
                    }
                }

                if (_core is { } core && FacesOf((x, y, z)).Count == 1 && IsCentre((x, y, z), (_size + 1) / 2))
                {
                    pairs.Add((piece, core));
                }
            }

            return pairs;
        }

        private IEnumerable<TurnBlueprint> Turns()
        {
            // Even sizes are held by the corner DBL, so only the cuts seen from U, R and F have a side away from it.
            foreach (var face in _size % 2 == 1 ? "URFDLB" : "URF")
            {
                for (var layers = 1; layers <= (_size % 2 == 1 ? _size / 2 : _size - 1); layers++)
                {
                    yield return Turn(FaceOrder.IndexOf(face, StringComparison.Ordinal), layers, TurnName(face, layers));
                }
            }
        }

        private TurnBlueprint Turn(int face, int layers, string name)
        {
            var images = new int[_sites.Count];
            var carried = new SortedSet<int>();
            for (var site = 0; site < images.Length; site++)
            {
                var (piece, side, corner) = _sites[site];
                var cell = _cells[piece];
                images[site] = site;
                var coordinate = (face / 2) switch { 0 => cell.X, 1 => cell.Y, _ => cell.Z };
                if (face % 2 == 0 ? coordinate > layers : coordinate <= _size - layers)
                {
                    continue;
                }

                carried.Add(piece);
                var target = _pieceAt[FromCentred(Rotate(ToCentred(cell), face))];
                var newSide = Array.IndexOf(Normals, Rotate(Normals[side], face));

                // A turning face centre goes round by one quarter: its corner sites follow each other clockwise.
                images[site] = _siteAt[(target, newSide, corner < 0 ? 0 : (corner + 1) % 4)];
            }

            return new TurnBlueprint(name, Permutation.FromTrustedImages<int>(images), [.. carried]);
        }

        private (int X, int Y, int Z) ToCentred((int X, int Y, int Z) cell) => ((2 * cell.X) - _size - 1, (2 * cell.Y) - _size - 1, (2 * cell.Z) - _size - 1);

        private (int X, int Y, int Z) FromCentred((int X, int Y, int Z) point) => ((point.X + _size + 1) / 2, (point.Y + _size + 1) / 2, (point.Z + _size + 1) / 2);

        /// <summary>A clockwise quarter turn as seen from the face.</summary>
        private static (int X, int Y, int Z) Rotate((int X, int Y, int Z) p, int face) => face switch
        {
            0 => (p.X, -p.Z, p.Y),
            1 => (p.X, p.Z, -p.Y),
            2 => (p.Z, p.Y, -p.X),
            3 => (-p.Z, p.Y, p.X),
            4 => (-p.Y, p.X, p.Z),
            _ => (p.Y, -p.X, p.Z),
        };
    }
}
