using RespDerive.Fhir.Server;
using RespDerive.Service.Delivery;
using RespDerive.Storage;

namespace RespDerive.Service.Tests;

/// <summary>Whose words the server holds. "c" is the content held, unless said otherwise.</summary>
public sealed class AuthorshipTests
{
    private static readonly HeldResult Held = new("5", "final", "c");

    [Fact]
    public void Version_confirmed_last_is_ours_whatever_else_is_there() =>
        Assert.IsType<Authorship.Confirmed>(Authorship.Of(Known(version: "5", attempt: "c"), Held, [Ours(9, "other")]));

    [Fact]
    public void Content_of_the_attempt_is_ours_without_any_Provenance() =>
        Assert.IsType<Authorship.Attempted>(Authorship.Of(Known(version: "4", attempt: "c"), Held, []));

    [Fact]
    public void Content_of_our_latest_Provenance_is_ours() =>
        Assert.Equal(new Authorship.Forgotten(3), Authorship.Of(Known(revisions: 2, version: "4", attempt: "other"), Held, [Ours(1, "a"), Ours(3, "c"), Ours(3, "never landed")]));

    [Fact]
    public void Everything_latest_counts_when_the_store_was_lost() =>
        Assert.Equal(new Authorship.Forgotten(2), Authorship.Of(Known(), Held, [Ours(1, "a"), Ours(2, "c")]));

    [Theory]
    [InlineData(2, "4", 2)] // an edition confirmed before, restored
    [InlineData(0, null, 1)] // the same, after the store was lost
    public void Earlier_content_of_ours_is_foreign(int revisions, string? version, int revision) =>
        Assert.IsType<Authorship.Foreign>(Authorship.Of(Known(revisions, version), Held, [Ours(revision, "c"), Ours(revision + 1, "later")]));

    [Fact]
    public void Restored_content_is_foreign_also_when_it_is_our_latest_word() =>
        Assert.IsType<Authorship.Foreign>(Authorship.Of(Known(revisions: 2, version: "4"), Held, [Ours(1, "a"), Ours(2, "c")]));

    [Fact]
    public void Content_nobody_of_us_testified_to_is_foreign() =>
        Assert.IsType<Authorship.Foreign>(Authorship.Of(Known(), Held, []));

    [Fact]
    public void Where_no_version_was_ever_told_the_edition_confirmed_last_is_ours() =>
        Assert.Equal(new Authorship.Forgotten(2), Authorship.Of(Known(revisions: 2, id: "77"), Held, [Ours(2, "c")]));

    private static OwnProvenance Ours(int revision, string digest) => new($"p{revision}", $"own{revision}{digest}", digest, revision);

    private static Storage.Delivery Known(int revisions = 0, string? version = null, string? attempt = null, string? id = null) => new()
    {
        Identity = Guid.Empty,
        Patient = 1,
        Current = null,
        LastValued = null,
        Wanted = revisions + 1,
        Delivered = revisions,
        Revisions = revisions,
        FinalSeen = false,
        ServerId = id ?? (version is null ? null : "77"),
        ServerVersion = version,
        Tries = 0,
        Due = default,
        Since = default,
        Recorded = default,
        Attempt = attempt is null ? null : new Attempt(revisions + 1, attempt, []),
    };
}
