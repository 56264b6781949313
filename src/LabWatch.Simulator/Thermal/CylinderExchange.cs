namespace LabWatch.Simulator.Thermal;

/// <summary>
/// Exchange areas A F (m^2) inside a cylindrical cavity whose wall is cut into rings of equal length, with a disc as bottom and an aperture plate in front,
/// from the view factor of coaxial parallel discs (Incropera and DeWitt, 6th ed., table 13.2) and its differences. Ring 0 lies behind the aperture.
/// </summary>
internal sealed class CylinderExchange
{
    private readonly double _radius;
    private readonly double _apertureRadius;
    private readonly double _length;
    private readonly int _rings;

    /// <summary>Dimensions in metres; the aperture is not wider than the cavity.</summary>
    public CylinderExchange(double radius, double length, double apertureRadius, int rings)
    {
        _radius = radius;
        _length = length;
        _apertureRadius = apertureRadius;
        _rings = rings;
    }

    /// <summary>Area of one ring.</summary>
    public double RingArea => 2 * Math.PI * _radius * _length / _rings;

    /// <summary>Area of the bottom disc.</summary>
    public double BottomArea => Math.PI * _radius * _radius;

    /// <summary>Area of the opening.</summary>
    public double ApertureArea => Math.PI * _apertureRadius * _apertureRadius;

    /// <summary>Between two rings; of a ring with itself where they are the same.</summary>
    public double RingToRing(int first, int second)
    {
        if (first == second)
        {
            return RingArea - (2 * (BottomArea - Section(Edge(1))));
        }

        (int near, int far) = first < second ? (first, second) : (second, first);
        return Section(Edge(far) - Edge(near + 1)) - Section(Edge(far + 1) - Edge(near + 1)) - Section(Edge(far) - Edge(near)) + Section(Edge(far + 1) - Edge(near));
    }

    /// <summary>Between a ring and the bottom disc.</summary>
    public double RingToBottom(int ring) => Section(_length - Edge(ring + 1)) - Section(_length - Edge(ring));

    /// <summary>Between a ring and the opening.</summary>
    public double RingToAperture(int ring) => Opening(Edge(ring)) - Opening(Edge(ring + 1));

    /// <summary>Between a ring and the inner side of the aperture plate.</summary>
    public double RingToPlate(int ring) => Section(Edge(ring)) - Section(Edge(ring + 1)) - RingToAperture(ring);

    /// <summary>Between the bottom disc and the opening.</summary>
    public double BottomToAperture => Opening(_length);

    /// <summary>Between the bottom disc and the inner side of the aperture plate.</summary>
    public double BottomToPlate => Section(_length) - Opening(_length);

    private double Edge(int index) => index * _length / _rings;

    private double Section(double distance) => BottomArea * DiscToDisc(_radius, _radius, distance);

    private double Opening(double distance) => ApertureArea * DiscToDisc(_apertureRadius, _radius, distance);

    /// <summary>View factor from a disc to a coaxial parallel disc.</summary>
    internal static double DiscToDisc(double fromRadius, double toRadius, double distance)
    {
        if (distance <= 0)
        {
            return Math.Min(1, toRadius * toRadius / (fromRadius * fromRadius));
        }

        double from = fromRadius / distance;
        double to = toRadius / distance;
        double s = 1 + ((1 + (to * to)) / (from * from));
        double ratio = toRadius / fromRadius;
        double root = Math.Sqrt(Math.Max(0, (s * s) - (4 * ratio * ratio)));

        // (s - root) / 2 without the cancellation of two large numbers at long distances.
        return 2 * ratio * ratio / (s + root);
    }
}
