using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Store;

namespace ProtoLedger.Protocols.Tests.Store;

public sealed class StoreReaderTests
{
    private const string History = """
        format: 1
        entries:
          - kind: protocol
            id: knee
            version: 1
            statedTime: "2019-03-05T08:00Z"
            statedBy: h.lindqvist
            reason: First.
            source: binder
            outcome: imported
          - kind: protocol
            id: knee
            proposal: knee-thin
            baseVersion: 1
            statedTime: "2020-03-05T08:00Z"
            statedBy: t.okafor
            reason: Thinner.
            source: mail
            outcome: declined
            decidedBy: h.lindqvist
        """;

    [Fact]
    public void ReadHistory_OrderedEntries_GivesThemWithTheirPaths()
    {
        var entries = StoreReader.ReadHistory(History).Require();
        Assert.Equal(["protocols/knee/v0001.yaml", "proposals/knee-thin.yaml"], entries.Select(entry => entry.Path));
        Assert.Equal(new DateTimeOffset(2019, 3, 5, 8, 0, 0, TimeSpan.Zero), entries[0].StatedTime);
        Assert.Equal((HistoryOutcome.Declined, "h.lindqvist"), (entries[1].Outcome, entries[1].DecidedBy));
    }

    [Theory]
    [InlineData("2020-03-05T08:00Z", "2018-03-05T08:00Z", "/entries/1/statedTime", "order of their times")]
    [InlineData("2020-03-05T08:00Z", "2020-02-31T08:00Z", "/entries/1/statedTime", "no such day")]
    [InlineData("2020-03-05T08:00Z", "yesterday", "/entries/1/statedTime", "not the form")]
    [InlineData("version: 1\n", "version: 2\n", "/entries/0/version", "count up by one")]
    [InlineData("baseVersion: 1", "baseVersion: 2", "/entries/1/baseVersion", "none of the versions above")]
    [InlineData("outcome: declined", "outcome: imported", "/entries/1/outcome", "does not go with")]
    [InlineData("proposal: knee-thin", "proposal: knee-thin\n    version: 2", "/entries/1", "either a version or a proposal")]
    [InlineData("outcome: declined", "outcome: approved", "/entries/1/outcome", "none of the allowed words")]
    [InlineData("reason: Thinner.", "why: Thinner.", "/entries/1/why", "unknown")]
    public void ReadHistory_WhatCannotBe_IsRefusedAtItsPlace(string old, string replacement, string pointer, string text)
    {
        var refused = Assert.IsType<MappingResult<IReadOnlyList<HistoryEntry>>.Refused>(StoreReader.ReadHistory(History.With(old, replacement)));
        Assert.Contains(refused.Errors, error => error.Pointer == pointer && error.Detail.Contains(text, StringComparison.Ordinal) && error.Line > 0);
    }

    [Fact]
    public void ReadPeople_TheSameNameTwice_IsRefused()
    {
        const string People = "format: 1\npeople:\n  - {name: a.b, displayName: A B, role: reviewer}\n  - {name: a.b, displayName: A C, role: reviewer}\n";
        var refused = Assert.IsType<MappingResult<IReadOnlyList<StorePerson>>.Refused>(StoreReader.ReadPeople(People));
        Assert.Equal("/people/1", Assert.Single(refused.Errors).Pointer);
    }
}
