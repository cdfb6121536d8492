namespace ProtoLedger.Physics.Qualification;

/// <summary>A family whose cases are series that the engine predicts.</summary>
internal interface IProtocolFamily : IQualificationFamily
{
    /// <summary>Reads a case as a series and its lanes.</summary>
    FamilyProtocol Protocol(CaseInputs inputs);
}
