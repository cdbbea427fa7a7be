using System.Collections.Immutable;

namespace Fusecraft.Groups;

/// <summary>One level of an <see cref="OrderCertificate"/>.</summary>
/// <param name="BasePoint">The base point, 0-based.</param>
/// <param name="Orbit">
/// The orbit of the base point under the strong generators that fix all base points before, in breadth-first order (generators in the order of the certificate): each point with the index in this list of the point it
/// was reached from and the index of the strong generator that took it there. The first entry is the base point itself, with -1 twice.
/// </param>
public sealed record CertificateLevel(int BasePoint, ImmutableArray<(int Point, int From, int Generator)> Orbit);
