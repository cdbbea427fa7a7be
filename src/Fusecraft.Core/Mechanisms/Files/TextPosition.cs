namespace Fusecraft.Mechanisms;

/// <summary>A place in a text: line and column, both 1-based, the column in characters (Unicode code points).</summary>
internal readonly record struct TextPosition(int Line, int Column)
{
    internal static TextPosition Start => new(1, 1);

    /// <summary>The place after some more UTF-8 text. Lines end with a line feed, which a carriage return may precede.</summary>
    internal TextPosition After(ReadOnlySpan<byte> utf8)
    {
        var (line, column) = this;
        foreach (var b in utf8)
        {
            if (b == '\n')
            {
                (line, column) = (line + 1, 1);
            }
            else if ((b & 0xC0) != 0x80)
            {
                // Every code point has exactly one byte that does not continue another.
                column++;
            }
        }

        return new TextPosition(line, column);
    }
}
