using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Physics.Qualification;

/// <summary>Derivatives of the signed signal with respect to ln T1, ln T2 (or ln T2*) and ln PD, of a case of another family.</summary>
/// <param name="families">The families whose cases are series.</param>
internal sealed class SensitivitiesFamily(IReadOnlyList<IProtocolFamily> families) : IQualificationFamily
{
    public string Name => "sensitivities";

    public IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question)
    {
        var name = inputs.Text("protocol_family");
        var family = families.FirstOrDefault(f => f.Name == name)
            ?? throw new ArgumentException($"/protocol_family: '{name}' is none of {string.Join(", ", families.Select(f => f.Name))}.");
        var protocol = family.Protocol(inputs.Object("protocol"));
        var derivatives = SignalDerivatives.Of(protocol.Series, FamilyProtocol.Setting, protocol.Lanes, protocol.Echo);
        return new Dictionary<string, ComputedQuantity>
        {
            ["signed"] = derivatives.Signed[0],
            ["dS_dlnT1"] = derivatives.ByLogT1[0],
            ["dS_dlnT2"] = derivatives.ByLogT2[0],
            ["dS_dlnPD"] = derivatives.ByLogProtonDensity[0],
        };
    }
}
