using System.Text.Json.Nodes;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Service.Calc;

/// <summary>What a calculator found: members in the order of adding, and the intermediate values that explain them. NaN and infinity become null.</summary>
internal sealed class CalcResult
{
    /// <summary>The result.</summary>
    public JsonObject Values { get; } = [];

    /// <summary>Intermediate values, shown with <c>--explain</c>.</summary>
    public JsonObject Steps { get; } = [];

    /// <summary>Adds a number.</summary>
    public CalcResult Add(string name, double value)
    {
        Values[name] = Number(value);
        return this;
    }

    /// <summary>Adds an estimate: its value under a name, its standard uncertainty under another.</summary>
    public CalcResult Add(string name, string uncertaintyName, Estimate estimate) =>
        Add(name, estimate.Value).Add(uncertaintyName, estimate.StandardUncertainty);

    /// <summary>Adds a text.</summary>
    public CalcResult Add(string name, string? text)
    {
        Values[name] = text;
        return this;
    }

    /// <summary>Adds true or false.</summary>
    public CalcResult Add(string name, bool flag)
    {
        Values[name] = flag;
        return this;
    }

    /// <summary>Adds an array of numbers.</summary>
    public CalcResult Add(string name, IEnumerable<double> values)
    {
        Values[name] = Numbers(values);
        return this;
    }

    /// <summary>Adds anything else.</summary>
    public CalcResult Add(string name, JsonNode? node)
    {
        Values[name] = node;
        return this;
    }

    /// <summary>Adds an intermediate value.</summary>
    public CalcResult Step(string name, double value)
    {
        Steps[name] = Number(value);
        return this;
    }

    /// <summary>Adds an intermediate text.</summary>
    public CalcResult Step(string name, string text)
    {
        Steps[name] = text;
        return this;
    }

    /// <summary>Adds intermediate numbers.</summary>
    public CalcResult Step(string name, IEnumerable<double> values)
    {
        Steps[name] = Numbers(values);
        return this;
    }

    /// <summary>A number as JSON; null where it is not finite.</summary>
    public static JsonNode? Number(double value) => double.IsFinite(value) ? JsonValue.Create(value) : null;

    /// <summary>Numbers as a JSON array.</summary>
    public static JsonArray Numbers(IEnumerable<double> values) => [.. values.Select(Number)];
}
