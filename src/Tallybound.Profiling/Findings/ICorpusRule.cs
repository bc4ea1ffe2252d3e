using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Findings;

/// <summary>A claim that only the whole of a run can carry. A pure function, as <see cref="IFindingRule"/> is.</summary>
internal interface ICorpusRule
{
    /// <summary>Its name; unique among rules of both kinds.</summary>
    string Id { get; }

    /// <summary>The claim about the run; null where its figures do not carry it.</summary>
    /// <param name="corpus">The whole of a run of at least two sources that were read.</param>
    Finding? Judge(CorpusProfile corpus);
}
