using System.Text;
using Konscious.Security.Cryptography;
using LabWatch.Records.Accounts;
using LabWatch.Records.Accounts.Passwords;

namespace LabWatch.Tests.Access;

public sealed class PasswordHasherTests
{
    private static readonly PasswordCost Cheap = new(64, 1);

    private static CancellationToken Cancel => TestContext.Current.CancellationToken;

    [Fact]
    public void The_library_computes_the_test_vector_of_the_standard()
    {
        // RFC 9106 (2021), 5.3, test vector of Argon2id; from memory.
        using Argon2id argon = new(Enumerable.Repeat((byte)1, 32).ToArray())
        {
            Salt = Enumerable.Repeat((byte)2, 16).ToArray(),
            KnownSecret = Enumerable.Repeat((byte)3, 8).ToArray(),
            AssociatedData = Enumerable.Repeat((byte)4, 12).ToArray(),
            MemorySize = 32,
            Iterations = 3,
            DegreeOfParallelism = 4,
        };

        Assert.Equal("0d640df58d78766c08c037a34a8b53c9d01ef0452d75b65eb52520e96b01e659", Convert.ToHexStringLower(argon.GetBytes(32)));
    }

    [Fact]
    public async Task A_password_is_known_again_in_either_form_of_unicode_and_another_is_not()
    {
        using PasswordHasher hasher = new(Cheap);
        PasswordHash hash = (await hasher.HashAsync("gr\u00fcner Reiher am Bach", Cancel))!;

        Assert.StartsWith("$argon2id$v=19$m=64,t=1,p=1$", hash.Text, StringComparison.Ordinal);
        Assert.True(await hasher.IsAsync("gru\u0308ner Reiher am Bach", hash, Cancel));
        Assert.False(await hasher.IsAsync("gr\u00fcner Reiher am bach", hash, Cancel));
        Assert.False(await hasher.IsAsync("gr\u00fcner Reiher am Bach", null, Cancel));
        Assert.DoesNotContain("argon", hash.ToString(), StringComparison.Ordinal);
    }

    [Fact]
    public async Task The_same_password_has_another_hash_each_time()
    {
        using PasswordHasher hasher = new(Cheap);
        Assert.NotEqual(await hasher.HashAsync("same", Cancel), await hasher.HashAsync("same", Cancel));
    }

    [Fact]
    public async Task A_hash_of_a_lower_cost_is_still_known_and_outgrown()
    {
        using PasswordHasher before = new(Cheap);
        using PasswordHasher now = new(Cheap with { MemoryKibibytes = 128 });
        PasswordHash hash = (await before.HashAsync("heron", Cancel))!;

        Assert.True(await now.IsAsync("heron", hash, Cancel));
        Assert.True(now.IsOutgrown(hash));
        Assert.False(before.IsOutgrown(hash));
    }

    [Theory]
    [InlineData("")]
    [InlineData("$argon2id$v=19$m=99999999,t=1,p=1$AAAAAAAAAAAAAAAAAAAAAA$AAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAA")]
    [InlineData("$argon2d$v=19$m=64,t=1,p=1$AAAAAAAAAAAAAAAAAAAAAA$AAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAA")]
    public async Task A_damaged_hash_is_nobodys(string text)
    {
        using PasswordHasher hasher = new(Cheap);
        Assert.False(await hasher.IsAsync("heron", new PasswordHash(text), Cancel));
    }

    [Fact]
    public async Task A_flood_is_turned_away_instead_of_queued_without_end()
    {
        using PasswordHasher hasher = new(new PasswordCost(1024, 1));

        PasswordHash?[] hashes = await Task.WhenAll(Enumerable.Range(0, 200).Select(_ => Task.Run(() => hasher.HashAsync("heron", Cancel).AsTask(), Cancel)));

        Assert.Contains(hashes, hash => hash is not null);
        Assert.NotNull(await hasher.HashAsync("heron", Cancel));
    }

    [Fact]
    public void The_cost_in_service_is_not_below_what_is_advised() =>
        // OWASP Password Storage Cheat Sheet, Argon2id: at least 19 MiB, 2 passes, 1 lane; from memory.
        Assert.True(PasswordCost.Standard is { MemoryKibibytes: >= 19_456, Passes: >= 2 }, Encoding.UTF8.WebName);
}
