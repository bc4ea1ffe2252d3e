using System.Text;
using System.Text.Encodings.Web;
using System.Text.Unicode;
using Microsoft.AspNetCore.Components;
using Microsoft.AspNetCore.Components.Web;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Logging.Abstractions;
using Tallybound.Reports.Files;

namespace Tallybound.Reports.Html;

/// <summary>Renders components to files. One object a report.</summary>
internal sealed class PageRenderer : IDisposable
{
    private readonly ServiceProvider services;
    private readonly HtmlRenderer renderer;

    public PageRenderer()
    {
        services = new ServiceCollection().AddSingleton(HtmlEncoder.Create(UnicodeRanges.All)).BuildServiceProvider();
        renderer = new HtmlRenderer(services, NullLoggerFactory.Instance);
    }

    /// <summary>Writes a page.</summary>
    /// <typeparam name="TPage">The page's component.</typeparam>
    /// <param name="path">The file.</param>
    /// <param name="parameters">The component's parameters by name.</param>
    /// <exception cref="IOException">The file cannot be written.</exception>
    public void Write<TPage>(string path, Dictionary<string, object?> parameters) where TPage : IComponent
    {
        string html = renderer.Dispatcher.InvokeAsync(async () =>
        {
            Microsoft.AspNetCore.Components.Web.HtmlRendering.HtmlRootComponent page = await renderer.RenderComponentAsync<TPage>(ParameterView.FromDictionary(parameters));
            return page.ToHtmlString();
        }).GetAwaiter().GetResult();
        WholeFile.Write(path, stream => stream.Write(Encoding.UTF8.GetBytes(html.Trim() + "\n")));
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        renderer.Dispose();
        services.Dispose();
    }
}
