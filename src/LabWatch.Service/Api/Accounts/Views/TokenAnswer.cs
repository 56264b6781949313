using System.ComponentModel;

namespace LabWatch.Service.Api.Accounts.Views;

/// <summary>A token that was just made.</summary>
internal sealed record TokenAnswer(TokenView Token, [property: Description("The token itself. Shown this once.")] string Value);
