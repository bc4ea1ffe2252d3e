namespace Tallybound.Reports.Html;

/// <summary>The page's style: one column, tabular figures, light and dark, fit for print.</summary>
internal static class PageStyle
{
    /// <summary>Cascading style sheet of the page.</summary>
    public const string Css = """
        :root{color-scheme:light dark;--ink:#1c1c1c;--paper:#fff;--rule:#c9c9c9;--soft:#f2f4f5;--best:#e3f1ec}
        @media (prefers-color-scheme:dark){:root{--ink:#ececec;--paper:#15181a;--rule:#4a5054;--soft:#1f2427;--best:#143a30}}
        body{margin:0;background:var(--paper);color:var(--ink);font:16px/1.5 system-ui,"Noto Sans","Open Sans",sans-serif}
        main{max-width:70rem;margin:0 auto;padding:1.5rem 1rem 4rem}
        h1{font-size:1.5rem;overflow-wrap:anywhere}h2{font-size:1.2rem;margin:2.5rem 0 .5rem;break-after:avoid}
        p,li,dd{max-width:75ch}.verdict{font-size:1.2rem;font-weight:600}.stopped{border-left:.3rem solid #d55e00;padding-left:.7rem}
        section{overflow-x:auto}table{border-collapse:collapse;font-variant-numeric:tabular-nums;margin:.5rem 0 1.5rem}
        caption{text-align:left;padding:.3rem 0;max-width:75ch}th,td{padding:.25rem .45rem;border-bottom:1px solid var(--rule);vertical-align:top}
        thead th{text-align:right;background:var(--soft)}thead th:first-child,thead th.text,tbody th,.text{text-align:left}tbody th{font-weight:400;min-width:10rem}thead th{vertical-align:bottom}td{text-align:right;white-space:nowrap}
        .name{overflow-wrap:anywhere;min-width:10rem}.text{white-space:normal}td.text{min-width:8rem}.best{background:var(--best)}.best th,.best td{font-weight:600}
        tr{break-inside:avoid}dt{font-weight:600}dd{margin:0 0 .4rem;overflow-wrap:anywhere}
        @media print{main{max-width:none;padding:0}section{overflow:visible}}
        """;
}
