using Fusecraft.Benchmarks;

if (args is ["large-graph", ..])
{
    LargeGraph.Run(args[1..]);
}
else if (args is ["small-graphs"])
{
    SmallGraphs.Run();
}
else
{
    BenchmarkDotNet.Running.BenchmarkSwitcher.FromAssembly(typeof(Program).Assembly).Run(args);
}
