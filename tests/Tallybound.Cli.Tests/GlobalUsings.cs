global using Tallybound.Tests;
global using Xunit;
