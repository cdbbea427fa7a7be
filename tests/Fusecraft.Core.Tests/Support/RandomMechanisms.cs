using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Support;

/// <summary>Small custom mechanisms with everything a file can hold: pieces of several sites, blocks, marks, nested guards, one-way turns, back guards, carried pieces. A seed gives one of them.</summary>
internal sealed class RandomMechanisms
{
    /// <summary>The seeds below this one are tried each time.</summary>
    public const ulong FixedSeeds = 300;

    private static readonly string[] Letters = ["a", "b", "c", "d", "e", "f", "g"];
    private readonly SeededRandom _random;
    private readonly ImmutableArray<string> _sites;
    private readonly List<ImmutableArray<string>> _pieces = [];
    private readonly List<MarkDefinition> _marks = [];

    private RandomMechanisms(ulong seed)
    {
        _random = new SeededRandom(seed);
        _sites = [.. Letters[..(4 + _random.NextInt32(4))]];
    }

    public static MechanismDefinition From(ulong seed) => new RandomMechanisms(seed).Make(seed);

    /// <summary>Checks the fixed seeds; where one fails it names the seed and shows the mechanism.</summary>
    public static void ForFixedSeeds(Action<ulong> check)
    {
        for (var seed = 0UL; seed < FixedSeeds; seed++)
        {
            try
            {
                check(seed);
            }
            catch (Exception problem)
            {
                throw new InvalidOperationException($"Seed {seed}: {problem.Message}\n{MechanismFile.Write(From(seed))}", problem);
            }
        }
    }

    /// <summary>The same mechanism with its sites in another order and under other names.</summary>
    public static MechanismDefinition Relabelled(MechanismDefinition definition, SeededRandom random)
    {
        var order = random.NextPermutation(definition.Sites.Length);
        var names = definition.Sites.ToDictionary(site => site, site => $"s{order[definition.Sites.IndexOf(site)] + 1}");
        return new MechanismDefinition
        {
            Name = definition.Name,
            Sites = Fusecraft.Tests.Support.Make.Numbers(definition.Sites.Length).ConvertAll(number => $"s{number}"),
            Pieces = definition.Pieces.ConvertAll(Renamed),
            Turns = definition.Turns.ConvertAll(turn => new TurnDefinition
            {
                Name = turn.Name,
                Moves = string.Concat(turn.Moves.Select(c => names.TryGetValue($"{c}", out var name) ? name : $"{c}")),
                Carries = Renamed(turn.Carries),
                Guard = Guard(turn.Guard),
                IsOneWay = turn.IsOneWay,
                Back = turn.Back is null ? null : Guard(turn.Back),
            }),
            Blocks = definition.Blocks.ConvertAll(Renamed),
            Marks = definition.Marks.ConvertAll(mark => mark with { Sites = Renamed(mark.Sites) }),
        };

        ImmutableArray<string> Renamed(ImmutableArray<string> sites) => sites.ConvertAll(site => names[site]);

        ImmutableArray<string> Marks(ImmutableArray<string> marks) => marks.ConvertAll(mark => $"{mark.Split('@')[0]}@{names[mark.Split('@')[1]]}");

        GuardDefinition Guard(GuardDefinition guard) => new() { Needs = Marks(guard.Needs), BarredBy = Marks(guard.BarredBy), AnyOf = guard.AnyOf.ConvertAll(Guard) };
    }

    private MechanismDefinition Make(ulong seed)
    {
        MakePieces();
        foreach (var name in (string[])["gap", "pin"])
        {
            if (Chance(85))
            {
                _marks.Add(new MarkDefinition(name, Some(_sites, 1 + _random.NextInt32(2))));
            }
        }

        var turns = ImmutableArray.CreateBuilder<TurnDefinition>();
        for (var i = 1 + _random.NextInt32(4); i > 0; i--)
        {
            turns.Add(MakeTurn($"T{i}"));
        }

        return new MechanismDefinition
        {
            Name = $"seed {seed}",
            Sites = _sites,
            Pieces = [.. _pieces.Where(piece => piece.Length > 1)],
            Turns = turns.ToImmutable(),
            Blocks = MakeBlocks(),
            Marks = [.. _marks],
        };
    }

    // Usually pieces of one site; else one size for as many as there is room for, so that they can go to each other's places.
    private void MakePieces()
    {
        var size = Chance(35) ? 2 + _random.NextInt32(2) : 1;
        ImmutableArray<string> sites = Some(_sites, _sites.Length);
        var wide = size == 1 ? 0 : 1 + _random.NextInt32(sites.Length / size);
        for (var at = 0; at < sites.Length; at += _pieces[^1].Length)
        {
            _pieces.Add(sites.Slice(at, _pieces.Count < wide ? size : 1));
        }
    }

    private TurnDefinition MakeTurn(string name)
    {
        var moves = MakeMoves();
        var fixedPieces = _pieces.FindAll(piece => !piece.Any(site => moves.Contains(site, StringComparison.Ordinal)));
        var oneWay = Chance(35);
        return new TurnDefinition
        {
            Name = name,
            Moves = moves,
            Carries = fixedPieces.Count > 0 && Chance(20) ? [fixedPieces[_random.NextInt32(fixedPieces.Count)][0]] : [],
            Guard = Chance(75) ? MakeGuard(2) : GuardDefinition.Always,
            IsOneWay = oneWay,
            Back = !oneWay && Chance(35) ? MakeGuard(1) : null,
        };
    }

    // One or two cycles of pieces of one size, their sites in step, now and then with one piece turned within itself.
    private string MakeMoves()
    {
        var text = "";
        var left = Shuffled(_pieces);
        for (var cycles = 1 + _random.NextInt32(2); cycles > 0 && left.Count > 0; cycles--)
        {
            var alike = left.FindAll(piece => piece.Length == left[0].Length);
            var cycle = alike[..Math.Min(alike.Count, 2 + _random.NextInt32(3))];
            left.RemoveAll(cycle.Contains);
            if (cycle.Count > 1)
            {
                // With a shift the piece comes home turned within itself after a round.
                var shift = _random.NextInt32(cycle[0].Length);
                text += Cycles(cycle, shift);
            }
            else if (cycle[0].Length > 1)
            {
                text += $"({string.Join(' ', cycle[0])})";
            }
        }

        return text.Length > 0 ? text : MakeMovesOfAll();
    }

    private string MakeMovesOfAll()
    {
        var singles = _pieces.FindAll(piece => piece.Length == 1);
        var wide = _pieces.Find(piece => piece.Length > 1);
        return wide.IsDefault ? $"({singles[0][0]} {singles[1][0]})" : $"({string.Join(' ', wide)})";
    }

    private static string Cycles(List<ImmutableArray<string>> pieces, int shift)
    {
        var size = pieces[0].Length;
        var image = new Dictionary<string, string>();
        for (var i = 0; i < pieces.Count; i++)
        {
            for (var k = 0; k < size; k++)
            {
                image[pieces[i][k]] = i + 1 < pieces.Count ? pieces[i + 1][k] : pieces[0][(k + shift) % size];
            }
        }

        var text = "";
        while (image.Count > 0)
        {
            var start = image.Keys.First();
            var cycle = new List<string> { start };
            for (var at = image[start]; at != start; at = image[at])
            {
                cycle.Add(at);
            }

            cycle.ForEach(site => image.Remove(site));
            text += $"({string.Join(' ', cycle)})";
        }

        return text;
    }

    private GuardDefinition MakeGuard(int depth)
    {
        var marks = _marks.SelectMany(mark => _sites.Select(site => $"{mark.Name}@{site}")).ToList();
        if (marks.Count == 0)
        {
            return GuardDefinition.Always;
        }

        var chosen = Some([.. marks], 2);
        return new GuardDefinition
        {
            Needs = Chance(60) ? [chosen[0]] : [],
            BarredBy = Chance(50) ? [chosen[1]] : [],
            AnyOf = depth > 0 && Chance(35) ? [.. Enumerable.Range(0, 1 + _random.NextInt32(3)).Select(_ => MakeGuard(depth - 1))] : [],
        };
    }

    private ImmutableArray<ImmutableArray<string>> MakeBlocks()
    {
        var pieces = Shuffled(_pieces);
        var blocks = ImmutableArray.CreateBuilder<ImmutableArray<string>>();
        for (var count = _random.NextInt32(3); count > 0; count--)
        {
            var size = 2 + _random.NextInt32(2);
            if (pieces.Count < size)
            {
                break;
            }

            blocks.Add([.. pieces[..size].Select(piece => piece[_random.NextInt32(piece.Length)])]);
            pieces.RemoveRange(0, size);
        }

        return blocks.ToImmutable();
    }

    private bool Chance(int percent) => _random.NextInt32(100) < percent;

    private List<T> Shuffled<T>(List<T> list)
    {
        var order = _random.NextPermutation(list.Count);
        return [.. Enumerable.Range(0, list.Count).Select(i => list[order[i]])];
    }

    private ImmutableArray<string> Some(ImmutableArray<string> from, int count) => [.. Shuffled([.. from]).Take(count)];
}

internal static class ImmutableArrayExtensions
{
    public static ImmutableArray<TResult> ConvertAll<T, TResult>(this ImmutableArray<T> array, Func<T, TResult> convert) => [.. array.Select(convert)];
}
