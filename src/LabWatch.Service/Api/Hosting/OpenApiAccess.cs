using LabWatch.Service.Api.Access;
using Microsoft.AspNetCore.Authorization;
using Microsoft.AspNetCore.OpenApi;
using Microsoft.OpenApi;

namespace LabWatch.Service.Api.Hosting;

/// <summary>Says in the OpenAPI document how callers are known, and what each operation needs.</summary>
internal static class OpenApiAccess
{
    /// <summary>Name of the extension of an operation: the permission it needs, <c>signed-in</c>, or <c>anybody</c>.</summary>
    public const string Extension = "x-permission";

    private const string Session = "session";
    private const string Token = "token";

    /// <summary>Adds it.</summary>
    public static void Add(OpenApiOptions options)
    {
        options.AddDocumentTransformer(static (document, _, _) =>
        {
            document.Components ??= new OpenApiComponents();
            document.Components.SecuritySchemes ??= new Dictionary<string, IOpenApiSecurityScheme>();
            document.Components.SecuritySchemes[Session] = new OpenApiSecurityScheme
            {
                Type = SecuritySchemeType.ApiKey,
                In = ParameterLocation.Cookie,
                Name = "labwatch",
                Description = "Session of a person, from POST /api/v1/sign-in. Over https the name begins with __Host-; the port follows it where the address has one.",
            };
            document.Components.SecuritySchemes[Token] = new OpenApiSecurityScheme
            {
                Type = SecuritySchemeType.Http,
                Scheme = "bearer",
                BearerFormat = "lw_...",
                Description = "Token of a program, from POST /api/v1/tokens.",
            };
            return Task.CompletedTask;
        });
        options.AddOperationTransformer(static (operation, context, _) =>
        {
            IList<object> metadata = context.Description.ActionDescriptor.EndpointMetadata;
            if (metadata.OfType<IAllowAnonymous>().Any())
            {
                operation.Security = [];
                Extend(operation, "anybody");
                return Task.CompletedTask;
            }

            operation.Security = [Requirement(Session, context.Document), Requirement(Token, context.Document)];
            string needed = metadata.OfType<PermissionNeeded>().LastOrDefault() is { } permission ? Names.Of(permission.Permission) : "signed-in";
            Extend(operation, needed);
            operation.Responses ??= [];
            operation.Responses.TryAdd("401", new OpenApiResponse { Description = "Nobody is signed in." });
            if (needed != "signed-in")
            {
                operation.Responses.TryAdd("403", new OpenApiResponse { Description = $"The caller may not do this now; it needs the permission {needed}." });
            }

            return Task.CompletedTask;
        });
    }

    private static OpenApiSecurityRequirement Requirement(string scheme, Microsoft.OpenApi.OpenApiDocument? document) =>
        new() { [new OpenApiSecuritySchemeReference(scheme, document)] = [] };

    private static void Extend(OpenApiOperation operation, string needed)
    {
        operation.Extensions ??= new Dictionary<string, IOpenApiExtension>();
        operation.Extensions[Extension] = new JsonNodeExtension(needed);
    }
}
