using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// Checks certificates of order. Shares nothing with the code that makes chains and certificates but the type <see cref="Permutation"/>, and is short enough to be read in one sitting.
/// </summary>
/// <remarks>
/// Why it is right then: strong generators are words in the generators, so they lie in the group; the generators sift away, so they lie in what the strong ones make; every Schreier generator of
/// each level sifts away below it, so by Schreier's lemma the levels below hold the whole stabilizer, and the order is the product of the orbit lengths. Takes (orbit points) · (strong generators) sifts.
/// </remarks>
public static class CertificateChecker
{
    /// <summary>Checks a certificate against the generators of the group it is meant for.</summary>
    /// <param name="certificate">The certificate.</param>
    /// <param name="generators">The generators of the group, in the order in which the certificate was made.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    public static CertificateVerdict Check(OrderCertificate certificate, IReadOnlyList<Permutation> generators, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(certificate);
        ArgumentNullException.ThrowIfNull(generators);
        return new CertificateVerdict(FindFault(certificate, generators, cancellationToken));
    }

    private static string? FindFault(OrderCertificate certificate, IReadOnlyList<Permutation> generators, CancellationToken cancellation)
    {
        if (!certificate.Generators.SequenceEqual(generators) || generators.Any(generator => generator.SupportEnd > certificate.Degree))
        {
            return "The generators of the certificate are not those of the group.";
        }

        if (FindProgramFault(certificate) is { } programFault)
        {
            return programFault;
        }

        var strong = certificate.StrongGenerators.Select(generator => generator.Permutation).ToArray();
        var transversals = new List<Dictionary<int, Permutation>>();
        var fixing = Enumerable.Range(0, strong.Length).ToList();
        var fixingAt = new List<int[]>();
        foreach (var level in certificate.Levels)
        {
            if (FindOrbitFault(level, fixing, strong, transversals) is { } orbitFault)
            {
                return $"Level {transversals.Count + 1}: {orbitFault}";
            }

            fixingAt.Add([.. fixing]);
            fixing.RemoveAll(s => strong[s][level.BasePoint] != level.BasePoint);
        }

        if (fixing.Count > 0)
        {
            return $"Strong generator {fixing[0] + 1} fixes all base points.";
        }

        if (Enumerable.Range(0, generators.Count).FirstOrDefault(g => !SiftsAway(generators[g], 0), -1) is var stuck and >= 0)
        {
            return $"Generator {stuck + 1} does not sift away.";
        }

        for (var i = 0; i < transversals.Count; i++)
        {
            cancellation.ThrowIfCancellationRequested();
            foreach (var (point, s) in transversals[i].Keys.SelectMany(point => fixingAt[i].Select(s => (point, s))))
            {
                if (!SiftsAway(transversals[i][point] * strong[s] * transversals[i][strong[s][point]].Inverse(), i + 1))
                {
                    return $"Level {i + 1}: the Schreier generator of point {point + 1} and strong generator {s + 1} does not sift away.";
                }
            }
        }

        var order = transversals.Aggregate(BigInteger.One, (product, transversal) => product * transversal.Count);
        return order == certificate.Order ? null : $"The orbit lengths multiply to {order}, not to the order claimed, {certificate.Order}.";

        bool SiftsAway(Permutation permutation, int from)
        {
            for (var i = from; i < transversals.Count; i++)
            {
                if (!transversals[i].TryGetValue(permutation[certificate.Levels[i].BasePoint], out var representative))
                {
                    return false;
                }

                permutation *= representative.Inverse();
            }

            return permutation.IsIdentity;
        }
    }

    // The program must be well-formed, give each element once and call it by one number only, and give each strong generator the permutation stated.
    private static string? FindProgramFault(OrderCertificate certificate)
    {
        var values = new List<Permutation>();
        var numberOf = new Dictionary<Permutation, int>();
        var seen = new HashSet<int>();
        certificate.Generators.ToList().ForEach(generator => Add(generator));
        foreach (var (left, right) in certificate.Elements)
        {
            if (!IsNumber(left) || !IsNumber(right) || !Add(Value(left) * Value(right)))
            {
                return $"Element {values.Count + 1} of the program, [{left}, {right}], refers to nothing before it, or gives what stands there already.";
            }
        }

        for (var s = 0; s < certificate.StrongGenerators.Length; s++)
        {
            var (number, permutation) = certificate.StrongGenerators[s];
            if (!IsNumber(number) || Value(number) != permutation || permutation.IsIdentity || !seen.Add(number))
            {
                return $"Strong generator {s + 1} is not what element {number} of the program gives, or stands there already.";
            }
        }

        return null;

        bool IsNumber(int number) => Math.Abs((long)number) is var n && n >= 1 && n <= values.Count && numberOf[Value(number)] == number;
        Permutation Value(int number) => number > 0 ? values[number - 1] : values[-number - 1].Inverse();
        bool Add(Permutation value)
        {
            values.Add(value);
            var isNew = numberOf.TryAdd(value, values.Count);
            numberOf.TryAdd(value.Inverse(), -values.Count);
            return isNew;
        }
    }

    // The orbit listed must be the one that the generators make, in breadth-first order; its transversal is added to the others.
    private static string? FindOrbitFault(CertificateLevel level, List<int> fixing, Permutation[] strong, List<Dictionary<int, Permutation>> transversals)
    {
        var orbit = new List<(int Point, int From, int Generator)> { (level.BasePoint, -1, -1) };
        var transversal = new Dictionary<int, Permutation> { [level.BasePoint] = Permutation.Identity };
        for (var i = 0; i < orbit.Count && level.BasePoint >= 0; i++)
        {
            foreach (var s in fixing.Where(s => transversal.TryAdd(strong[s][orbit[i].Point], transversal[orbit[i].Point] * strong[s])))
            {
                orbit.Add((strong[s][orbit[i].Point], i, s));
            }
        }

        transversals.Add(transversal);
        return level.BasePoint >= 0 && orbit.SequenceEqual(level.Orbit) ? null : "the orbit and its tree are not those of the base point.";
    }
}
