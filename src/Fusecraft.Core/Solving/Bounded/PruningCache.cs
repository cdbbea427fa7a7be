using Fusecraft.Groupoids;

namespace Fusecraft.Solving;

/// <summary>Tables kept in a folder, under names made of what they are tables of.</summary>
internal static class PruningCache
{
    /// <summary>The table, read where it is kept, else built and kept; null where it does not fit the options.</summary>
    /// <exception cref="InvalidDataException">A file of that name is damaged; the message names it.</exception>
    public static PruningTable? Get(CosetCoordinates first, CosetCoordinates? second, Metric metric, PruningOptions options, string? folder, CancellationToken cancellation)
    {
        if (folder is null || GuardForm.IsCoded(first.Mechanism))
        {
            return PruningTable.Build(first, second, metric, options, cancellation);
        }

        var name = Convert.ToHexStringLower(PruningTable.Fingerprint(first, second, metric))[..32];
        var path = Path.Combine(folder, name + PruningTable.FileExtension);
        if (File.Exists(path))
        {
            try
            {
                var kept = PruningTable.Load(first, second, metric, path);
                return kept.ByteCount <= options.MaxBytes ? kept : null;
            }
            catch (InvalidDataException problem)
            {
                throw new InvalidDataException($"{path}: {problem.Message} Remove the file to have the table built anew.", problem);
            }
        }

        var table = PruningTable.Build(first, second, metric, options, cancellation);
        table?.Save(path);
        return table;
    }
}
