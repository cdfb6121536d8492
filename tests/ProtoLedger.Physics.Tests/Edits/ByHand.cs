namespace ProtoLedger.Physics.Tests.Edits;

/// <summary>Signals written down from the Bloch equations for ideal pulses, step by step or in closed form; nothing here calls the program.</summary>
internal static class ByHand
{
    public static double Decay(double time, double constant) => Math.Exp(-time / constant);

    /// <summary>Free recovery of m for a time.</summary>
    public static double Recover(double m, double time, double t1) => 1 - (1 - m) * Decay(time, t1);

    /// <summary>
    /// Mz before a 90° excitation in the steady state: inversion with efficiency f, TI, excitation, n ideal refocusing pulses (the first at half a spacing),
    /// recovery to the next inversion.
    /// </summary>
    public static double InversionRecovery(double t1, double tr, double ti, double f, double spacing, int refocusings)
    {
        var m = 0.0;
        for (var i = 0; i < refocusings; i++)
            m = Recover(-Recover(m, spacing / 2, t1), spacing / 2, t1);
        m = Recover(m, tr - ti - spacing * refocusings, t1);
        return Recover(-f * m, ti, t1);
    }

    /// <summary>TI that nulls that Mz, by bisection of the expression above.</summary>
    public static double NullTime(double t1, double tr, double f, double spacing, int refocusings)
    {
        var (low, high) = (1.0, tr - spacing * refocusings);
        for (var i = 0; i < 200; i++)
        {
            var middle = (low + high) / 2;
            if (InversionRecovery(t1, tr, middle, f, spacing, refocusings) < 0)
                low = middle;
            else
                high = middle;
        }

        return low;
    }

    /// <summary>[1 − 2 exp(−(TR − TE/2)/T1) + exp(−TR/T1)] exp(−TE/T2): spin echo after 90°.</summary>
    public static double SpinEcho(double t1, double t2, double tr, double te) =>
        (1 - 2 * Decay(tr - te / 2, t1) + Decay(tr, t1)) * Decay(te, t2);

    /// <summary>Ernst, Anderson, Rev Sci Instrum 1966;37:93 (from memory).</summary>
    public static double Spoiled(double t1, double t2Star, double tr, double te, double flip)
    {
        var (a, e) = (flip * Math.PI / 180, Decay(tr, t1));
        return Math.Sin(a) * (1 - e) / (1 - e * Math.Cos(a)) * Decay(te, t2Star);
    }

    /// <summary>Freeman, Hill 1971, on resonance with alternating phase (from memory).</summary>
    public static double Balanced(double t1, double t2, double tr, double flip)
    {
        var (a, e1, e2) = (flip * Math.PI / 180, Decay(tr, t1), Decay(tr, t2));
        return Math.Sin(a) * (1 - e1) / (1 - (e1 - e2) * Math.Cos(a) - e1 * e2) * Decay(tr / 2, t2);
    }

    /// <summary>Constant field for a time (Rabi): Mz → multiplier · Mz.</summary>
    public static double HardPulse(double flip, double durationMs, double b1Scale, double offResonanceHz)
    {
        var field = b1Scale * flip / 360 / (durationMs * 1e-3);
        var turn = Math.Sqrt(field * field + offResonanceHz * offResonanceHz);
        return 1 - 2 * Math.Pow(field / turn * Math.Sin(Math.PI * turn * durationMs * 1e-3), 2);
    }
}
