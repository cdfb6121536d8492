namespace ProtoLedger.Physics.Observables;

/// <summary>Window of a parameter, such as the inversion time, in which a limit on an observable holds.</summary>
/// <param name="Low">Lower end, unit of the parameter.</param>
/// <param name="High">Upper end.</param>
public readonly record struct NullWindow(double Low, double High)
{
    /// <summary>High − Low.</summary>
    public double Width => High - Low;

    /// <summary>Distance of a set inversion time from the null, ms: positive where it is set too long.</summary>
    /// <param name="inversionTime">As set, ms.</param>
    /// <param name="nullTime">Null, ms.</param>
    public static double Distance(double inversionTime, double nullTime) => inversionTime - nullTime;

    /// <summary>The connected window around a point in which |observable| ≤ limit.</summary>
    /// <param name="observable">The observable of the parameter, continuous; the engine's own prediction.</param>
    /// <param name="around">Point inside the window, usually the null.</param>
    /// <param name="low">Lowest parameter allowed, ≤ <paramref name="around"/>.</param>
    /// <param name="high">Highest parameter allowed, ≥ <paramref name="around"/>.</param>
    /// <param name="limit">Limit on the magnitude, ≥ 0.</param>
    /// <param name="steps">Steps into which each side is divided before a crossing is bisected; a return above the limit narrower than one step is missed.</param>
    /// <returns>The window, its ends to 10⁻⁹ of the range; null where the limit does not hold at <paramref name="around"/>.</returns>
    public static NullWindow? Find(Func<double, double> observable, double around, double low, double high, double limit, int steps = 64)
    {
        ArgumentNullException.ThrowIfNull(observable);
        bool Holds(double x) => Math.Abs(observable(x)) <= limit;
        return Holds(around) ? new NullWindow(End(Holds, around, low, steps), End(Holds, around, high, steps)) : null;
    }

    private static double End(Func<double, bool> holds, double from, double to, int steps)
    {
        var inside = from;
        for (var i = 1; i <= steps; i++)
        {
            var next = i == steps ? to : from + (to - from) * i / steps;
            if (!holds(next))
                return Bisect(holds, inside, next);
            inside = next;
        }

        return to;
    }

    private static double Bisect(Func<double, bool> holds, double inside, double outside)
    {
        for (var i = 0; i < 40; i++)
        {
            var middle = (inside + outside) / 2;
            if (holds(middle))
                inside = middle;
            else
                outside = middle;
        }

        return inside;
    }
}
