namespace Fusecraft.Groups;

public sealed partial class PermutationGroup
{
    /// <summary>Describes the group: order, series, composition factors, and the action on each orbit with its block systems, by name where a name is proven.</summary>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>Builds a chain for each action, kernel and member of a series met. Proven, never guessed: what could not be settled is left open and says so.</remarks>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public GroupPortrait Portrait(CancellationToken cancellationToken = default) => new(this, cancellationToken);
}
