namespace Fusecraft.Mechanisms;

/// <summary>The width of a shape's key as a type, so that code on keys is written once and compiled for each width.</summary>
internal interface IShapeWidth
{
    /// <summary>The number of 64-bit words: a constant of the type, or for the widest type the actual number.</summary>
    static abstract int Words(int actual);
}

/// <summary>Up to 64 slots.</summary>
internal readonly struct OneWord : IShapeWidth
{
    public static int Words(int actual) => 1;
}

/// <summary>Up to 128 slots.</summary>
internal readonly struct TwoWords : IShapeWidth
{
    public static int Words(int actual) => 2;
}

/// <summary>Up to 256 slots.</summary>
internal readonly struct FourWords : IShapeWidth
{
    public static int Words(int actual) => 4;
}

/// <summary>Up to 512 slots.</summary>
internal readonly struct EightWords : IShapeWidth
{
    public static int Words(int actual) => 8;
}

/// <summary>Any number of slots.</summary>
internal readonly struct ManyWords : IShapeWidth
{
    public static int Words(int actual) => actual;
}
