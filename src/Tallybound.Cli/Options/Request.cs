namespace Tallybound.Cli.Options;

/// <summary>What a command line means: one kind a command.</summary>
internal abstract record Request;
