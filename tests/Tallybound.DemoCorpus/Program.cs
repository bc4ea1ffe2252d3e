using Tallybound.DemoCorpus;

// Writes the demo corpora into a folder: dotnet run --project tests/Tallybound.DemoCorpus -c Release -- corpora-demo
if (args.Length != 1)
{
    await Console.Error.WriteLineAsync("usage: Tallybound.DemoCorpus FOLDER").ConfigureAwait(false);
    return 2;
}
foreach ((string name, byte[] content) in Fleet.Files())
{
    string path = Path.Combine(args[0], name);
    Directory.CreateDirectory(Path.GetDirectoryName(path)!);
    await File.WriteAllBytesAsync(path, content).ConfigureAwait(false);
}
return 0;
