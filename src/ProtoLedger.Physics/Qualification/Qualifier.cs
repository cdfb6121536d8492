namespace ProtoLedger.Physics.Qualification;

/// <summary>Evaluates reference files with the public engine: what a physicist qualifies an installation with.</summary>
public static class Qualifier
{
    private static readonly IProtocolFamily[] ProtocolFamilies =
    [
        new SpinEchoFamily("spin_echo"),
        new MultiEchoSpinEchoFamily(),
        new SpinEchoFamily("echo_train_steady_state"),
        new SpinEchoFamily("driven_equilibrium"),
        new InversionRecoveryFamily(),
        new DoubleInversionRecoveryFamily(),
        new SpoiledGradientEchoFamily(),
        new BalancedFamily(),
        new InversionGradientTrainFamily(),
        new DiffusionSpinEchoFamily(),
    ];

    /// <summary>Every family the engine has. A new family is one class and one line here.</summary>
    private static readonly Dictionary<string, IQualificationFamily> Families = new IQualificationFamily[]
    {
        new SensitivitiesFamily(ProtocolFamilies),
        new InversionPulsesFamily(),
        new SliceProfileFamily(),
        new FatSaturationFamily(),
    }.Concat(ProtocolFamilies).ToDictionary(f => f.Name);

    /// <summary>Computes every case of a file.</summary>
    /// <param name="file">The file.</param>
    /// <returns>The report; a family that is not built gives a report that says so, a case that cannot be computed carries its error.</returns>
    public static QualificationReport Evaluate(QualificationFile file)
    {
        ArgumentNullException.ThrowIfNull(file);
        return Families.TryGetValue(file.Family, out var family)
            ? new QualificationReport(file.Family, true, Prediction.ModelIdentity.Current, [.. file.Cases.Select(c => Evaluate(family, c))])
            : new QualificationReport(file.Family, false, Prediction.ModelIdentity.Current, []);
    }

    private static QualificationCaseResult Evaluate(IQualificationFamily family, QualificationCase testCase)
    {
        try
        {
            var computed = family.Compute(new CaseInputs(testCase.Inputs), testCase.Question);
            var missing = testCase.Question.FirstOrDefault(name => !computed.ContainsKey(name));
            return missing is null
                ? new QualificationCaseResult(testCase.Id, [.. testCase.Question.Select(name => Judge(testCase, name, computed[name]))], null)
                : new QualificationCaseResult(testCase.Id, [], $"The family {family.Name} has no quantity {missing} for these inputs.");
        }
        catch (Exception e) when (e is ArgumentException or InvalidOperationException)
        {
            return new QualificationCaseResult(testCase.Id, [], e.Message);
        }
    }

    private static QualificationQuantity Judge(QualificationCase testCase, string name, ComputedQuantity computed)
    {
        if (testCase.Expected is null)
            return new QualificationQuantity(name, computed.Values, computed.IsList, null, null, QuantityVerdict.Asked);
        var expected = testCase.Expected[name];
        var limit = testCase.ToleranceByQuantity.TryGetValue(name, out var own) ? own : testCase.AbsoluteTolerance;
        var sameLength = expected.Count == computed.Values.Count;
        var deviation = sameLength ? expected.Zip(computed.Values, (e, c) => Math.Abs(e - c)).DefaultIfEmpty(0).Max() : double.PositiveInfinity;
        return new QualificationQuantity(
            name, computed.Values, computed.IsList, deviation, double.IsNaN(limit) ? null : limit,
            deviation <= limit ? QuantityVerdict.Within : QuantityVerdict.Outside);
    }
}
