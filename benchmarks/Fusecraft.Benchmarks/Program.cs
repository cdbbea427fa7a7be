using Fusecraft.Benchmarks;

switch (args)
{
    case ["sympy"]:
        return SymPyComparison.Run();
    case ["large-graph", ..]:
        LargeGraph.Run(args[1..]);
        return 0;
    case ["large-group", ..]:
        LargeGraph.RunGroup(args[1..]);
        return 0;
    case ["distance-tables", ..]:
        DistanceTables.Run(args[1..]);
        return 0;
    case ["short-words", ..]:
        ShortWords.Run(args[1..]);
        return 0;
    case ["small-graphs"]:
        SmallGraphs.Run();
        return 0;
    default:
        BenchmarkDotNet.Running.BenchmarkSwitcher.FromAssembly(typeof(Program).Assembly).Run(args);
        return 0;
}
