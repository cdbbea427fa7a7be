using Fusecraft.Permutations;

namespace Fusecraft.Tests.Published;

/// <summary>Small finite fields and the permutations that matrices make on vectors and on projective points. Written for these tests alone.</summary>
internal sealed class ProjectiveGroups
{
    private readonly int _characteristic;
    private readonly int[] _modulus;

    /// <summary>The field of q elements: q a prime, 4, 8, 9 or 16. Elements are numbers whose digits in base p are the coefficients of a polynomial.</summary>
    public ProjectiveGroups(int q)
    {
        Q = q;
        (_characteristic, _modulus) = q switch
        {
            4 => (2, [1, 1, 1]),
            8 => (2, [1, 1, 0, 1]),
            9 => (3, [1, 0, 1]),
            16 => (2, [1, 1, 0, 0, 1]),
            _ => (q, new[] { 0, 1 }),
        };
    }

    public int Q { get; }

    public int Add(int a, int b)
    {
        var (sum, scale) = (0, 1);
        for (; a > 0 || b > 0; a /= _characteristic, b /= _characteristic, scale *= _characteristic)
        {
            sum += (a + b) % _characteristic * scale;
        }

        return sum;
    }

    public int Multiply(int a, int b)
    {
        var degree = _modulus.Length - 1;
        if (degree == 1)
        {
            return a * b % Q;
        }

        var product = new int[2 * degree];
        for (var i = 0; i < degree; i++)
        {
            for (var j = 0; j < degree; j++)
            {
                product[i + j] += Digit(a, i) * Digit(b, j);
            }
        }

        for (var i = product.Length - 1; i >= degree; i--)
        {
            var lead = product[i] % _characteristic;
            for (var j = 0; j <= degree; j++)
            {
                product[i - degree + j] += (_characteristic - lead) * _modulus[j];
            }
        }

        return product.Take(degree).Reverse().Aggregate(0, (value, digit) => (value * _characteristic) + (digit % _characteristic));
    }

    public int Inverse(int a) => Enumerable.Range(1, Q - 1).Single(b => Multiply(a, b) == 1);

    public int Negative(int a) => Enumerable.Range(0, Q).Single(b => Add(a, b) == 0);

    /// <summary>A generator of the multiplicative group.</summary>
    public int PrimitiveElement => Enumerable.Range(1, Q - 1).First(g =>
    {
        var (power, order) = (g, 1);
        for (; power != 1; order++)
        {
            power = Multiply(power, g);
        }

        return order == Q - 1;
    });

    /// <summary>The map x to (ax + b) / (cx + d) on the projective line: points 0 … q-1 and q for infinity.</summary>
    public Permutation Moebius(int a, int b, int c, int d) => Permutation.FromImages([.. Enumerable.Range(0, Q + 1).Select(x =>
    {
        var above = x == Q ? a : Add(Multiply(a, x), b);
        var below = x == Q ? c : Add(Multiply(c, x), d);
        return below == 0 ? Q : Multiply(above, Inverse(below));
    })]);

    /// <summary>All elementary transvections x_i += t x_j with t through a basis of the field; they generate SL(n, q).</summary>
    public IEnumerable<Func<int[], int[]>> Transvections(int n)
    {
        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < n; j++)
            {
                for (var t = 1; t < Q && i != j; t *= _characteristic)
                {
                    var (to, from, scale) = (i, j, t);
                    yield return vector =>
                    {
                        var image = vector.ToArray();
                        image[to] = Add(image[to], Multiply(scale, image[from]));
                        return image;
                    };
                }
            }
        }
    }

    /// <summary>A linear map as a permutation of the projective points: vectors whose first coordinate other than 0 is 1.</summary>
    public Permutation OnProjectivePoints(int n, Func<int[], int[]> map)
    {
        int[][] points = [.. Vectors(n).Where(vector => vector.FirstOrDefault(x => x != 0) == 1)];
        return On(points, vector =>
        {
            var image = map(vector);
            var scale = Inverse(image.First(x => x != 0));
            return [.. image.Select(x => Multiply(scale, x))];
        });
    }

    /// <summary>A map of the vectors, all q^n of them, as a permutation.</summary>
    public Permutation OnVectors(int n, Func<int[], int[]> map) => On([.. Vectors(n)], map);

    private static Permutation On(int[][] points, Func<int[], int[]> map)
    {
        var indexOf = points.Select((point, i) => (Key: string.Join(',', point), i)).ToDictionary(pair => pair.Key, pair => pair.i);
        return Permutation.FromImages([.. points.Select(point => indexOf[string.Join(',', map(point))])]);
    }

    private IEnumerable<int[]> Vectors(int n) => n == 0 ? [[]] : Vectors(n - 1).SelectMany(head => Enumerable.Range(0, Q).Select(x => (int[])[.. head, x]));

    private int Digit(int a, int i)
    {
        for (; i > 0; i--)
        {
            a /= _characteristic;
        }

        return a % _characteristic;
    }
}
