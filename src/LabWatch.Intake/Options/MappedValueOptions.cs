using LabWatch.Intake.Units;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;

namespace LabWatch.Intake.Options;

/// <summary>One value of a mapped message.</summary>
public sealed record MappedValueOptions
{
    /// <summary>JSON Pointer (RFC 6901) to the value: a number, a text of digits, true or false, or null for no value.</summary>
    public string At { get; init; } = string.Empty;

    /// <summary>Id of the channel.</summary>
    public string Channel { get; init; } = string.Empty;

    /// <summary>Unit of the value, a SenML or UCUM name; null for the channel's.</summary>
    public string? Unit { get; init; }

    /// <summary>Everything wrong with this value.</summary>
    /// <param name="where">Name of the option that holds it.</param>
    public IEnumerable<Finding> Validate(string where) =>
    [
        .. MappingOptions.Pointer($"{where}.{nameof(At)}", At),
        .. OptionCheck.Must(Slug.IsValid(Channel), $"{where}.{nameof(Channel)}", "This is no id of a channel.", Channel, "Set the id in the lab file."),
        .. OptionCheck.Must(Unit is null || UnitTable.IsKnown(Unit), $"{where}.{nameof(Unit)}", "The unit is not known.", Unit, "Use a SenML or UCUM name of docs/reference/intake.md."),
    ];
}
