using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Findings;

/// <summary>One claim that figures may carry. A rule is a pure function of a record: it reads, compares and words, and computes no figure of its own.</summary>
internal interface IFindingRule
{
    /// <summary>Its name, such as <c>table-eats-gain</c>; unique among rules.</summary>
    string Id { get; }

    /// <summary>What the bytes are saved against, in the words of a list over many sources.</summary>
    string Against { get; }

    /// <summary>When the claim would not hold, in one sentence.</summary>
    string HoldsUnless { get; }

    /// <summary>The claim about one source; null where its figures do not carry it.</summary>
    /// <param name="source">The source's record.</param>
    /// <param name="view">Its first view, with at least one symbol.</param>
    Finding? Judge(SourceProfile source, ViewProfile view);

    /// <summary>The claim about all sources in which the rule fires, in one sentence that names the bytes at stake where there are any.</summary>
    string ClaimOfMany(FindingTotal total);
}
