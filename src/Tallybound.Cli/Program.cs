using Tallybound.Cli.Running;

return CommandLine.Run(args);
