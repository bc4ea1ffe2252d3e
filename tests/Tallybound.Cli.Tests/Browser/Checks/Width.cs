namespace Tallybound.Cli.Tests.Browser.Checks;

/// <summary>A page is as wide as the window, and no text lies where it cannot be read.</summary>
/// <remarks>A box that scrolls by itself may hold more than it shows. Text in a box of at most one pixel is for readers of the screen
/// only, and text that is not drawn cannot be cut.</remarks>
internal static class Width
{
    private const string Script = """
        () => {
          const faults = [];
          const root = document.documentElement, width = root.clientWidth;
          if (root.scrollWidth > width) faults.push(`the page is ${root.scrollWidth} px wide in a window of ${width} px`);
          const slack = 1;
          const walker = document.createTreeWalker(document.body, NodeFilter.SHOW_TEXT);
          const range = document.createRange();
          for (let node = walker.nextNode(); node; node = walker.nextNode()) {
            if (!node.data.trim() || node.parentElement.closest('script,style,template,title') || !node.parentElement.checkVisibility({ visibilityProperty: true })) continue;
            range.selectNodeContents(node);
            for (const box of range.getClientRects()) {
              if (box.width === 0) continue;
              let left = box.left, right = box.right, scrolls = false, hidden = false, cutBy = '';
              for (let e = node.parentElement; e && e !== root && e !== document.body && !scrolls; e = e.parentElement) {
                const style = getComputedStyle(e), edge = e.getBoundingClientRect();
                if (style.display === 'contents' || (style.display === 'inline' && e.tagName !== 'svg')) continue;
                if (edge.width <= 1 && edge.height <= 1 && style.overflowX !== 'visible') { hidden = true; break; }
                if (style.overflowX === 'auto' || style.overflowX === 'scroll') { scrolls = true; break; }
                if ((style.overflowX === 'hidden' || style.overflowX === 'clip') && (left < edge.left - slack || right > edge.right + slack)) cutBy = e.tagName.toLowerCase();
                if ((style.overflowY === 'hidden' || style.overflowY === 'clip') && (box.top < edge.top - slack || box.bottom > edge.bottom + slack)) cutBy = e.tagName.toLowerCase();
              }
              if (hidden) continue;
              if (cutBy) faults.push(`text cut off by its ${cutBy}: ${node.data.trim().slice(0, 60)}`);
              else if (!scrolls && (left < -slack || right > width + slack)) faults.push(`text from ${left.toFixed(0)} to ${right.toFixed(0)} in a window of ${width} px: ${node.data.trim().slice(0, 60)}`);
              else continue;
              break;
            }
          }
          return faults;
        }
        """;

    public static async Task<IReadOnlyList<string>> FaultsAsync(OpenPage page) => await page.AskAsync<string[]>(Script);
}
