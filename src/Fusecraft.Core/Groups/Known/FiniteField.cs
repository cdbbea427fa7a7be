namespace Fusecraft.Groups;

/// <summary>
/// The field of q elements, q a prime power. Elements are numbers 0 … q-1 whose digits in base p are the coefficients of a polynomial, lowest first; 0 and 1 are themselves. Products go through logarithms to a
/// primitive element.
/// </summary>
internal sealed class FiniteField
{
    private readonly int[] _exponentials;
    private readonly int[] _logarithms;

    /// <param name="q">A prime power up to 65,536.</param>
    public FiniteField(int q)
    {
        Q = q;
        var powers = FactoredInteger.FromFactors(q).PrimePowers;
        (Characteristic, Dimension) = powers is [var (prime, exponent)] ? (prime, exponent) : throw new ArgumentOutOfRangeException(nameof(q), q, "A finite field has a prime power of elements.");
        (_exponentials, _logarithms) = Dimension == 1 ? PrimeField() : ExtensionField();
    }

    public int Q { get; }

    public int Characteristic { get; }

    /// <summary>The dimension over the prime field; 1, p, p², … are a basis.</summary>
    public int Dimension { get; }

    /// <summary>An element whose powers are all elements but 0.</summary>
    public int Primitive => Q == 2 ? 1 : _exponentials[1];

    public int Add(int a, int b)
    {
        var (sum, place) = (0, 1);
        for (; a > 0 || b > 0; a /= Characteristic, b /= Characteristic, place *= Characteristic)
        {
            sum += (a + b) % Characteristic * place;
        }

        return sum;
    }

    public int Multiply(int a, int b) => a == 0 || b == 0 ? 0 : _exponentials[(_logarithms[a] + _logarithms[b]) % (Q - 1)];

    public int Inverse(int a) => _exponentials[(Q - 1 - _logarithms[a]) % (Q - 1)];

    private (int[] Exponentials, int[] Logarithms) PrimeField()
    {
        for (var candidate = 1; ; candidate++)
        {
            if (TryTable(element => (int)((long)element * candidate % Q)) is { } table)
            {
                return table;
            }
        }
    }

    // Looks for a polynomial such that x is primitive: x^n = lower, where the digits of lower run over all possibilities.
    private (int[] Exponentials, int[] Logarithms) ExtensionField()
    {
        var top = Q / Characteristic;
        for (var lower = 1; ; lower++)
        {
            var reduction = Multiples(lower);
            if (TryTable(element => Add(element % top * Characteristic, reduction[element / top])) is { } table)
            {
                return table;
            }
        }
    }

    private int[] Multiples(int element)
    {
        var multiples = new int[Characteristic];
        for (var i = 1; i < multiples.Length; i++)
        {
            multiples[i] = Add(multiples[i - 1], element);
        }

        return multiples;
    }

    private (int[] Exponentials, int[] Logarithms)? TryTable(Func<int, int> next)
    {
        var exponentials = new int[Q - 1];
        var logarithms = new int[Q];
        var element = 1;
        for (var power = 0; power < Q - 1; power++)
        {
            if (power > 0 && element is (0 or 1))
            {
                return null;
            }

            exponentials[power] = element;
            logarithms[element] = power;
            element = next(element);
        }

        return element == 1 ? (exponentials, logarithms) : null;
    }
}
