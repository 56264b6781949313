namespace LabWatch.Metrology.Cavities;

/// <summary>Fineness of the panels, in units of the cavity's radius.</summary>
/// <param name="Order">Nodes a panel.</param>
/// <param name="Shortest">Length of the panel at a corner or apex.</param>
/// <param name="Longest">Length of the longest panel.</param>
/// <param name="Growth">Ratio of the distances from the corner of the two ends of a panel.</param>
internal sealed record PanelOptions(int Order, double Shortest, double Longest, double Growth)
{
    /// <summary>Fine enough for 1e-9 of 1 - e_eff.</summary>
    public static PanelOptions Fine { get; } = new(10, 1e-3, 1.0, 3);
}
