using LabWatch.Lab.Time;
using LabWatch.Service.Api.Live;
using Microsoft.OpenApi;

namespace LabWatch.Service.Api.Hosting;

/// <summary>The OpenAPI document of the API.</summary>
internal static class OpenApiDocument
{
    /// <summary>Name of the document: it is served at /openapi/v1.json.</summary>
    public const string Name = "v1";

    /// <summary>Adds the document.</summary>
    public static void Add(IServiceCollection services) => services.AddOpenApi(Name, options =>
    {
        options.AddDocumentTransformer((document, _, _) =>
        {
            document.Info.Title = "LabWatch";
            document.Info.Version = SiteBoard.Version;
            document.Info.Description =
                "Readings, assessments and alerts of a laboratory's reference blackbody sources. Times are RFC 3339 in UTC, units stand in the names. "
                + "Errors are problem details (RFC 9457) whose `findings` list everything that is wrong. " + SiteBoard.Caution;
            document.Servers?.Clear();
            return Task.CompletedTask;
        });
        OpenApiAccess.Add(options);
        options.AddSchemaTransformer((schema, context, _) =>
        {
            Type type = Nullable.GetUnderlyingType(context.JsonTypeInfo.Type) ?? context.JsonTypeInfo.Type;
            if (type == typeof(Instant))
            {
                schema.Type = JsonSchemaType.String | (type == context.JsonTypeInfo.Type ? default : JsonSchemaType.Null);
                schema.Format = "date-time";
            }

            return Task.CompletedTask;
        });
    });
}
