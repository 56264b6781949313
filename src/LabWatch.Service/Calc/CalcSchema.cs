using System.Text.Json.Nodes;

namespace LabWatch.Service.Calc;

/// <summary>The JSON Schema (draft 2020-12) of a calculator's input.</summary>
internal static class CalcSchema
{
    /// <summary>The schema of a whole input.</summary>
    public static JsonObject Of(Calculator calculator)
    {
        JsonObject schema = new()
        {
            ["$schema"] = "https://json-schema.org/draft/2020-12/schema",
            ["title"] = $"labwatch calc {calculator.Name}",
            ["description"] = calculator.Summary,
        };
        AddMembers(schema, calculator.Fields);
        return schema;
    }

    private static void AddMembers(JsonObject schema, IReadOnlyList<CalcField> fields)
    {
        schema["type"] = "object";
        schema["properties"] = new JsonObject(fields.Select(field => KeyValuePair.Create<string, JsonNode?>(field.Name, Of(field))));
        if (fields.Any(field => field.Required))
        {
            schema["required"] = new JsonArray([.. fields.Where(field => field.Required).Select(field => (JsonNode)field.Name)]);
        }

        schema["additionalProperties"] = false;
    }

    private static JsonObject Of(CalcField field)
    {
        JsonObject schema = new() { ["description"] = field.Description };
        switch (field.Kind)
        {
            case CalcFieldKind.Number or CalcFieldKind.Integer:
                AddNumber(schema, field, field.Kind == CalcFieldKind.Integer ? "integer" : "number");
                break;
            case CalcFieldKind.Flag:
                schema["type"] = "boolean";
                break;
            case CalcFieldKind.Choice:
                schema["enum"] = new JsonArray([.. field.Choices.Select(choice => (JsonNode)choice)]);
                break;
            case CalcFieldKind.Text:
                schema["type"] = "string";
                break;
            case CalcFieldKind.Object:
                AddMembers(schema, field.Fields);
                break;
            default:
                AddItems(schema, field);
                break;
        }

        return schema;
    }

    private static void AddItems(JsonObject schema, CalcField field)
    {
        JsonObject item = [];
        if (field.Kind == CalcFieldKind.Objects)
        {
            AddMembers(item, field.Fields);
        }
        else
        {
            AddNumber(item, field, "number");
            if (field.AllowsGaps)
            {
                item["type"] = new JsonArray("number", "null");
            }
        }

        schema["type"] = "array";
        schema["items"] = item;
        schema["minItems"] = field.MinimumItems;
        schema["maxItems"] = field.MaximumItems;
    }

    private static void AddNumber(JsonObject schema, CalcField field, string type)
    {
        schema["type"] = type;
        if (double.IsFinite(field.Minimum))
        {
            schema[field.IsAboveMinimum ? "exclusiveMinimum" : "minimum"] = field.Minimum;
        }

        if (double.IsFinite(field.Maximum))
        {
            schema["maximum"] = field.Maximum;
        }
    }
}
