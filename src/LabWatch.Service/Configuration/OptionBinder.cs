using System.ComponentModel;
using System.Reflection;
using LabWatch.Lab.Findings;

namespace LabWatch.Service.Configuration;

/// <summary>
/// Fills option records from configuration and lists every key that does not fit, where the framework's binder would stop at the first
/// or pass over it.
/// </summary>
internal static class OptionBinder
{
    /// <summary>Sets the members of an option record that a section names.</summary>
    /// <param name="section">The section; may be empty.</param>
    /// <param name="options">Record with its defaults; init-only members may be set.</param>
    /// <param name="findings">Gets one finding for each unknown key and each value of the wrong type.</param>
    public static void Bind(IConfigurationSection section, object options, List<Finding> findings)
    {
        foreach (IConfigurationSection child in section.GetChildren())
        {
            PropertyInfo? property = Settable(options.GetType()).FirstOrDefault(candidate => string.Equals(candidate.Name, child.Key, StringComparison.OrdinalIgnoreCase));
            if (property is null)
            {
                string known = string.Join(", ", Settable(options.GetType()).Select(candidate => candidate.Name));
                findings.Add(new Finding("unknown-option", child.Path, "This option is not known.", Finding.Quote(child.Value), $"Remove it or use one of: {known}."));
            }
            else
            {
                Set(child, property, options, findings);
            }
        }
    }

    private static IEnumerable<PropertyInfo> Settable(Type type) =>
        type.GetProperties(BindingFlags.Public | BindingFlags.Instance).Where(property => property.SetMethod is not null);

    private static void Set(IConfigurationSection child, PropertyInfo property, object options, List<Finding> findings)
    {
        Type type = Nullable.GetUnderlyingType(property.PropertyType) ?? property.PropertyType;
        if (type.IsGenericType && type.GetGenericTypeDefinition() == typeof(IReadOnlyList<>))
        {
            property.SetValue(options, BindList(child, type.GetGenericArguments()[0], findings));
            return;
        }

        if (type != typeof(string) && type.IsClass)
        {
            object nested = property.GetValue(options) ?? Activator.CreateInstance(type)!;
            Bind(child, nested, findings);
            property.SetValue(options, nested);
            return;
        }

        if (TryConvert(child.Value, type, out object? value))
        {
            property.SetValue(options, value);
            return;
        }

        findings.Add(new Finding("bad-option", child.Path, $"The value is not {Describe(type)}.", Finding.Quote(child.Value), "Correct the value; the pages in docs/reference list the options of each section."));
    }

    private static System.Collections.IList BindList(IConfigurationSection section, Type itemType, List<Finding> findings)
    {
        var items = (System.Collections.IList)Activator.CreateInstance(typeof(List<>).MakeGenericType(itemType))!;
        foreach (IConfigurationSection child in section.GetChildren().OrderBy(child => int.TryParse(child.Key, System.Globalization.CultureInfo.InvariantCulture, out int index) ? index : int.MaxValue))
        {
            object item = Activator.CreateInstance(itemType)!;
            Bind(child, item, findings);
            items.Add(item);
        }

        return items;
    }

    private static bool TryConvert(string? text, Type type, out object? value)
    {
        try
        {
            value = text is null ? null : TypeDescriptor.GetConverter(type).ConvertFromInvariantString(text);
            return value is not null && (!type.IsEnum || Enum.IsDefined(type, value));
        }
        catch (Exception exception) when (exception is FormatException or ArgumentException or NotSupportedException or OverflowException)
        {
            value = null;
            return false;
        }
    }

    private static string Describe(Type type) =>
        type == typeof(TimeSpan) ? "a duration such as 00:00:10"
        : type == typeof(bool) ? "true or false"
        : type.IsEnum ? "one of " + string.Join(", ", Enum.GetNames(type))
        : type == typeof(string) ? "a text"
        : "a number";
}
