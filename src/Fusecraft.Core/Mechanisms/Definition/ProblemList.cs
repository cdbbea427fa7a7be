namespace Fusecraft.Mechanisms;

/// <summary>Collects the problems of a definition; a member that has been complained about already is not complained about again.</summary>
internal sealed class ProblemList
{
    private readonly List<MechanismProblem> _problems = [];
    private readonly HashSet<string> _paths = [];
    private readonly Func<string, (int Line, int Column)?> _locate;

    /// <param name="locate">Gives line and column of the JSON path, or of the nearest enclosing member that is in the file.</param>
    public ProblemList(Func<string, (int Line, int Column)?>? locate = null) => _locate = locate ?? (static _ => null);

    public bool IsEmpty => _problems.Count == 0;

    public void Add(string path, string found, string expected)
    {
        if (_paths.Add(path))
        {
            var at = _locate(path);
            _problems.Add(new MechanismProblem(path, at?.Line, at?.Column, found, expected));
        }
    }

    /// <summary>Accepts no complaint about a member any more, for one that is inside a member which could not be read.</summary>
    public void Silence(string path) => _paths.Add(path);

    /// <summary>Adds a problem whose place is known better than by its path, such as that of a member's name.</summary>
    public void AddAt(TextPosition place, string path, string found, string expected) =>
        _problems.Add(new MechanismProblem(path, place.Line, place.Column, found, expected));

    /// <summary>True when the member, or one inside it, has a problem.</summary>
    public bool Concerns(string path) =>
        _paths.Contains(path) || _paths.Any(other => other.StartsWith(path, StringComparison.Ordinal) && other[path.Length] is '.' or '[');

    public MechanismFormatException ToException() =>
        new(_problems.OrderBy(problem => problem.Line ?? 0).ThenBy(problem => problem.Column ?? 0));
}
