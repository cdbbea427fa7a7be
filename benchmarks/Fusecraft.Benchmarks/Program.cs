using Fusecraft.Benchmarks;

if (args is ["large-graph", ..])
{
    LargeGraph.Run(args[1..]);
}
else
{
    BenchmarkDotNet.Running.BenchmarkSwitcher.FromAssembly(typeof(Program).Assembly).Run(args);
}
