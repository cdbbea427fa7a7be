namespace Fusecraft.Mechanisms;

/// <summary>Writes a file whole or not at all.</summary>
internal static class AtomicFile
{
    /// <summary>Lets the caller write to a temporary file beside the given one and then renames it into place; where anything fails, an older file stays as it was.</summary>
    internal static void Write(string path, Action<Stream> write)
    {
        // A link stays a link; what it points to is replaced.
        var file = new FileInfo(path);
        var target = file.LinkTarget is null ? file.FullName : file.ResolveLinkTarget(returnFinalTarget: true)!.FullName;
        var temporary = $"{target}.{Path.GetRandomFileName()}";
        try
        {
            using (var stream = new FileStream(temporary, FileMode.CreateNew, FileAccess.Write))
            {
                write(stream);
                stream.Flush(flushToDisk: true);
            }

            File.Move(temporary, target, overwrite: true);
        }
        catch
        {
            File.Delete(temporary);
            throw;
        }
    }
}
