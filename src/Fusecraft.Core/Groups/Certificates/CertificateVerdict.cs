using System.Diagnostics.CodeAnalysis;

namespace Fusecraft.Groups;

/// <summary>What <see cref="CertificateChecker"/> says of a certificate.</summary>
/// <param name="FailingStep">The step of the proof that fails, in a sentence; null where the certificate is accepted.</param>
public readonly record struct CertificateVerdict(string? FailingStep)
{
    /// <summary>True when every step holds, so that the order claimed is the order of the group.</summary>
    [MemberNotNullWhen(false, nameof(FailingStep))]
    public bool IsAccepted => FailingStep is null;
}
