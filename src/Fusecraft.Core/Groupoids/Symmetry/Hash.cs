using System.Runtime.CompilerServices;

namespace Fusecraft.Groupoids;

/// <summary>Hashes that are the same in every run and on every machine.</summary>
internal static class Hash
{
    /// <summary>Mixes two numbers; their order matters.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ulong Mix(ulong a, ulong b)
    {
        var mixed = ((a ^ (a >> 31)) * 0x9E3779B97F4A7C15) + b;
        mixed = (mixed ^ (mixed >> 32)) * 0xD6E8FEB86659FD93;
        return (mixed ^ (mixed >> 29)) * 0xBF58476D1CE4E5B9;
    }

    public static ulong Of(string text)
    {
        var hash = (ulong)text.Length;
        foreach (var character in text)
        {
            hash = Mix(hash, character);
        }

        return hash;
    }
}
