namespace Tallybound.Reports.Run;

/// <summary>Which pictures are written as files beside the pages.</summary>
public enum PictureChoice
{
    /// <summary>Those of the corpus page and of the ten heaviest sources.</summary>
    Usual,

    /// <summary>Those of every page.</summary>
    All,
}
