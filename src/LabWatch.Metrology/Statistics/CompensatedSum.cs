namespace LabWatch.Metrology.Statistics;

/// <summary>
/// A running sum with error compensation: A. Neumaier, "Rundungsfehleranalyse einiger Verfahren zur Summation endlicher Summen", Z. Angew. Math. Mech. 54 (1974) 39-51.
/// The order of the additions alone decides the result, so it is the same on every machine and for every vector width.
/// </summary>
internal struct CompensatedSum
{
    private double _sum;
    private double _lost;

    public readonly double Value => _sum + _lost;

    public void Add(double term)
    {
        double next = _sum + term;
        _lost += Math.Abs(_sum) >= Math.Abs(term) ? _sum - next + term : term - next + _sum;
        _sum = next;
    }
}
