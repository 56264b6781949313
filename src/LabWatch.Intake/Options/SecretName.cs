using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;

namespace LabWatch.Intake.Options;

/// <summary>The form of a secret's name: an id, so that it can be a file name and part of a variable's name.</summary>
internal static class SecretName
{
    /// <summary>Everything wrong with an optional name.</summary>
    public static IEnumerable<Finding> Validate(string where, string? name) =>
        OptionCheck.Must(
            name is null || Slug.IsValid(name), where, "The name of a secret is 1 to 63 small letters, digits and hyphens.", name, "Name the secret, for example broker-password; never write the secret itself here.");
}
