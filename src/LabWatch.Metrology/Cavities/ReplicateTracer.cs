using LabWatch.Metrology.Statistics;

namespace LabWatch.Metrology.Cavities;

/// <summary>The rays of one randomisation, traced one after the other into sums of its own.</summary>
internal sealed class ReplicateTracer<TScene>
    where TScene : struct, IRayScene
{
    private readonly TScene _scene;
    private readonly RayStart _start;
    private readonly HitTally _tally;
    private readonly int _replicate;
    private readonly double _diffuse;
    private readonly int _perReflection;
    private readonly SobolPoints _points;
    private readonly double[] _alive;
    private readonly double[] _hits;
    private readonly double[] _escapes;
    private readonly bool[] _isSecond;
    private readonly int _zones;
    private Xoshiro256 _random;

    public ReplicateTracer(TScene scene, RayStart start, HitTally tally, int replicate, double diffuse, ulong seed)
    {
        (_scene, _start, _tally, _replicate, _diffuse) = (scene, start, tally, replicate, diffuse);
        _perReflection = diffuse is > 0 and < 1 ? 3 : 2;
        _random = new Xoshiro256(unchecked(seed * 1_000_003 + (ulong)replicate));
        _points = new SobolPoints(ref _random);
        _alive = new double[tally.Depth];
        (_hits, _escapes, _zones) = (tally.Hits[replicate], tally.Escapes[replicate], tally.Grid.Zones.Count);
        _isSecond = [.. Enumerable.Range(0, tally.Grid.LineCount).Select(line => tally.Grid.IsSecond(line, tally))];
    }

    public void Trace(int rays)
    {
        for (int i = 0; i < rays; i++)
        {
            _points.Next();
            TraceOne();
        }

        Normalise();
    }

    private void TraceOne()
    {
        bool arrived = _start.Place(_points, out Ray ray);
        if (!arrived && !_scene.Advance(ref ray)) return;
        int dimension = _start.Dimensions, onSecond = 0, depth = _tally.Depth;
        for (int k = 0; k < depth; k++, dimension += _perReflection)
        {
            int order = _tally.IndexOf(k, onSecond), second = _isSecond[ray.Line] ? 1 : 0;
            _alive[k]++;
            _tally.Grid.Add(_hits.AsSpan(order * _zones, _zones), ray.Line, _scene.Along(ray), 1);
            double escape = _diffuse > 0 ? _diffuse * _scene.ToAperture(ray) : 0;
            Ray mirrored = ray;
            bool stays = _diffuse < 1 && Mirror(ref mirrored);
            if (_diffuse < 1 && !stays) escape += 1 - _diffuse;
            _escapes[2 * order + second] += escape;
            onSecond += second;
            if (k == depth - 1) return;
            if (_perReflection == 3 ? Coordinate(dimension + 2) < _diffuse : _diffuse >= 1)
            {
                if (!Scatter(ref ray, dimension)) return;
            }
            else
            {
                if (!stays) return;
                ray = mirrored;
            }
        }
    }

    /// <summary>Reflects as by a mirror; false where the ray then leaves.</summary>
    private bool Mirror(ref Ray ray)
    {
        (double normalR, double normalZ) = _scene.Normal(ray);
        double twice = 2 * (ray.Radial * normalR + ray.Axial * normalZ);
        ray.Radial -= twice * normalR;
        ray.Axial -= twice * normalZ;
        return _scene.Advance(ref ray);
    }

    /// <summary>Reflects by the cosine law; false where the ray then leaves. Half of the azimuths suffice: the other half is their mirror image.</summary>
    private bool Scatter(ref Ray ray, int dimension)
    {
        (double normalR, double normalZ) = _scene.Normal(ray);
        double square = Coordinate(dimension), cosine = Math.Sqrt(square), sine = Math.Sqrt(1 - square);
        (double around, double along) = Math.SinCos(Math.PI * Coordinate(dimension + 1));
        ray.Radial = cosine * normalR + sine * along * normalZ;
        ray.Axial = cosine * normalZ - sine * along * normalR;
        ray.Around = sine * around;
        return _scene.Advance(ref ray);
    }

    private double Coordinate(int dimension) => dimension < SobolPoints.Dimensions ? _points[dimension] : _random.NextUniform();

    /// <summary>
    /// Makes means of the sums, and the survivors of each order those that the escapes so far leave: the mean number is known better from the escapes, which are
    /// counted in full, than from the rays that happened to stay. Where no ray is left, the last order goes on in its own ratio.
    /// </summary>
    private void Normalise()
    {
        double survivors = 1, before = 1;
        for (int k = 0; k < _tally.Depth; k++)
        {
            if (_alive[k] == 0 && k > 0) Continue(k, before > 0 ? survivors / before : 0);
            double scale = _alive[k] > 0 ? survivors / _alive[k] : 1, left = 0;
            for (int order = _tally.IndexOf(k, 0); order < _tally.IndexOf(k + 1, 0); order++)
            {
                foreach (ref double hits in _tally.Zones(_replicate, order)) hits *= scale;
                for (int m = 2 * order; m < 2 * order + 2; m++) left += _tally.Escapes[_replicate][m] *= scale;
            }

            (before, survivors) = (survivors, Math.Max(0, survivors - left));
        }
    }

    /// <summary>Repeats the order before, with as many reflections on the second material.</summary>
    private void Continue(int k, double ratio)
    {
        int count = _tally.IndexOf(k, 0) - _tally.IndexOf(k - 1, 0);
        for (int b = 0; b < count; b++)
        {
            int earlier = _tally.IndexOf(k - 1, b), order = _tally.IndexOf(k, b);
            ReadOnlySpan<double> hits = _tally.Zones(_replicate, earlier);
            Span<double> zones = _tally.Zones(_replicate, order);
            for (int i = 0; i < zones.Length; i++) zones[i] = hits[i] * ratio;
            for (int m = 0; m < 2; m++) _tally.Escapes[_replicate][2 * order + m] = _tally.Escapes[_replicate][2 * earlier + m] * ratio;
        }
    }
}
