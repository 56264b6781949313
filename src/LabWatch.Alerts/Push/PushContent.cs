namespace LabWatch.Alerts.Push;

/// <summary>What the page's worker shows. Members are only ever added.</summary>
/// <param name="Title">What kind of alert.</param>
/// <param name="Body">The headline.</param>
/// <param name="Tag">The alert: a later message about it takes the place of an earlier one.</param>
/// <param name="Address">The page to open, within the app.</param>
/// <param name="IsUrgent">Whether it stays on the screen until somebody deals with it.</param>
internal sealed record PushContent(string Title, string Body, string Tag, string Address, bool IsUrgent);
