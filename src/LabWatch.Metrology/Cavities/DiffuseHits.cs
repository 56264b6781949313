namespace LabWatch.Metrology.Cavities;

/// <summary>Hits of one order at the nodes of a mesh and at the apex, which is no node.</summary>
internal readonly record struct DiffuseHits(double[] Nodes, double Apex);
