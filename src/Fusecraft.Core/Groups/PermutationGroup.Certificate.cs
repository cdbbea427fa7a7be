namespace Fusecraft.Groups;

public sealed partial class PermutationGroup
{
    /// <summary>A certificate of the group's order, which <see cref="CertificateChecker"/> checks on its own.</summary>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>Takes a permutation for each orbit point of each level; meant for groups whose chains have up to some ten thousand of those.</remarks>
    public OrderCertificate CertifyOrder(CancellationToken cancellationToken = default) => new CertificateBuilder(this).Build(cancellationToken);
}
