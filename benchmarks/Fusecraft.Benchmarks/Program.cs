if (args is ["sympy"])
{
    return Fusecraft.Benchmarks.SymPyComparison.Run();
}

BenchmarkDotNet.Running.BenchmarkSwitcher.FromAssembly(typeof(Program).Assembly).Run(args);
return 0;
