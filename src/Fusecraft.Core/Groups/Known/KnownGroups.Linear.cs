using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

// Groups of matrices over finite fields, on vectors and on projective points.
public static partial class KnownGroups
{
    /// <summary>
    /// The affine group AGL(d, q): all maps v → v·M + b of the q^d vectors, M invertible. The vector (v_0, …, v_(d-1)) is number v_0 + v_1·q + …; an element of a field that is no prime field is numbered by its
    /// coefficients in base p. The order is q^d · (q^d - 1)(q^d - q)…(q^d - q^(d-1)).
    /// </summary>
    /// <param name="dimension">d, at least 1.</param>
    /// <param name="fieldSize">q, a prime power.</param>
    /// <exception cref="ArgumentException">q is no prime power, d is below 1, or q^d is above <see cref="Permutation.MaxDegree"/>.</exception>
    public static PermutationGroup AffineGeneral(int dimension, int fieldSize)
    {
        var (field, vectors) = Space(dimension, fieldSize);
        var generators = Transvections(field, dimension).Append(Scaling(field, dimension)).Select(matrix => FromFunction(vectors, vector => Apply(field, matrix, vector)))
            .Append(FromFunction(vectors, vector => vector - (vector % fieldSize) + field.Add(vector % fieldSize, 1)))
            .Where(generator => !generator.IsIdentity);
        return OfKnownOrder(generators, vectors, vectors * OrderOfGeneralLinear(dimension, fieldSize));
    }

    /// <summary>
    /// The projective special linear group PSL(d, q) on the (q^d - 1)/(q - 1) projective points, numbered in the order of their vectors (see <see cref="AffineGeneral"/>) with last non-zero entry 1. The order is that of
    /// SL(d, q) divided by gcd(d, q - 1).
    /// </summary>
    /// <param name="dimension">d, at least 2.</param>
    /// <param name="fieldSize">q, a prime power.</param>
    /// <exception cref="ArgumentException">q is no prime power, d is below 2, or q^d is above <see cref="Permutation.MaxDegree"/>.</exception>
    public static PermutationGroup ProjectiveSpecial(int dimension, int fieldSize) =>
        Projective(dimension, fieldSize, isSpecial: true, OrderOfGeneralLinear(dimension, fieldSize) / (fieldSize - 1) / BigInteger.GreatestCommonDivisor(dimension, fieldSize - 1));

    /// <summary>The projective general linear group PGL(d, q) on the projective points, numbered as in <see cref="ProjectiveSpecial"/>. The order is that of GL(d, q) divided by q - 1.</summary>
    /// <param name="dimension">d, at least 2.</param>
    /// <param name="fieldSize">q, a prime power.</param>
    /// <exception cref="ArgumentException">q is no prime power, d is below 2, or q^d is above <see cref="Permutation.MaxDegree"/>.</exception>
    public static PermutationGroup ProjectiveGeneral(int dimension, int fieldSize) =>
        Projective(dimension, fieldSize, isSpecial: false, OrderOfGeneralLinear(dimension, fieldSize) / (fieldSize - 1));

    private static PermutationGroup Projective(int dimension, int fieldSize, bool isSpecial, BigInteger order)
    {
        if (dimension < 2)
        {
            throw new ArgumentException($"The dimension is {dimension}; projective points need at least 2.", nameof(dimension));
        }

        var (field, vectors) = Space(dimension, fieldSize);
        var numberOf = new Dictionary<int, int>();
        for (var vector = 1; vector < vectors; vector++)
        {
            if (Normalized(field, vector) == vector)
            {
                numberOf.Add(vector, numberOf.Count);
            }
        }

        var points = numberOf.Keys.ToArray();
        var matrices = isSpecial ? Transvections(field, dimension) : Transvections(field, dimension).Append(Scaling(field, dimension));
        var generators = matrices.Select(matrix => FromFunction(points.Length, point => numberOf[Normalized(field, Apply(field, matrix, points[point]))])).Where(generator => !generator.IsIdentity);
        return OfKnownOrder(generators, points.Length, order);
    }

    private static (FiniteField Field, int Vectors) Space(int dimension, int fieldSize)
    {
        if (dimension < 1)
        {
            throw new ArgumentException($"The dimension is {dimension}; it must be at least 1.", nameof(dimension));
        }

        if (fieldSize < 2 || FactoredInteger.FromFactors(fieldSize).PrimePowers.Length != 1)
        {
            throw new ArgumentException($"There is no field of {fieldSize} elements; their number is a prime power.", nameof(fieldSize));
        }

        RequireProductDegree(dimension > 16 ? long.MaxValue : (long)BigInteger.Min(long.MaxValue, BigInteger.Pow(fieldSize, dimension)));
        return (new FiniteField(fieldSize), (int)BigInteger.Pow(fieldSize, dimension));
    }

    // Adds a multiple of one entry to its neighbour, for neighbours either way and multiples by a basis of the field: together they generate SL.
    private static IEnumerable<int[,]> Transvections(FiniteField field, int dimension)
    {
        for (var i = 0; i + 1 < dimension; i++)
        {
            for (var (k, factor) = (0, 1); k < field.Dimension; k++, factor *= field.Characteristic)
            {
                foreach (var (row, column) in ((int, int)[])[(i, i + 1), (i + 1, i)])
                {
                    var matrix = Unit(dimension);
                    matrix[row, column] = factor;
                    yield return matrix;
                }
            }
        }
    }

    private static int[,] Scaling(FiniteField field, int dimension)
    {
        var matrix = Unit(dimension);
        matrix[0, 0] = field.Primitive;
        return matrix;
    }

    private static int[,] Unit(int dimension)
    {
        var matrix = new int[dimension, dimension];
        for (var i = 0; i < dimension; i++)
        {
            matrix[i, i] = 1;
        }

        return matrix;
    }

    // The row vector times the matrix.
    private static int Apply(FiniteField field, int[,] matrix, int vector)
    {
        var dimension = matrix.GetLength(0);
        var image = 0;
        for (var (column, place) = (0, 1); column < dimension; column++, place *= field.Q)
        {
            var entry = 0;
            for (var (row, rest) = (0, vector); row < dimension; row++, rest /= field.Q)
            {
                entry = field.Add(entry, field.Multiply(rest % field.Q, matrix[row, column]));
            }

            image += entry * place;
        }

        return image;
    }

    // The multiple of a vector whose last non-zero entry is 1.
    private static int Normalized(FiniteField field, int vector)
    {
        var last = vector;
        while (last >= field.Q)
        {
            last /= field.Q;
        }

        var factor = field.Inverse(last);
        var scaled = 0;
        for (var (rest, place) = (vector, 1); rest > 0; rest /= field.Q, place *= field.Q)
        {
            scaled += field.Multiply(rest % field.Q, factor) * place;
        }

        return scaled;
    }

    private static BigInteger OrderOfGeneralLinear(int dimension, int fieldSize)
    {
        var order = BigInteger.One;
        for (var i = 0; i < dimension; i++)
        {
            order *= BigInteger.Pow(fieldSize, dimension) - BigInteger.Pow(fieldSize, i);
        }

        return order;
    }
}
