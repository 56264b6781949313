using System.Text;
using LabWatch.Records.Accounts.Passwords;

namespace LabWatch.Tests.Access;

/// <summary>What NIST SP 800-63B-4 (2025), 3.1.1.2 asks of a verifier, cited from memory.</summary>
public sealed class PasswordPolicyTests
{
    private static readonly string[] Context = ["kim-lee", "Kim Lee", "hollin-vale"];

    [Theory]
    [InlineData("correct horse battery staple")]
    [InlineData("gr\u00fcne Wiese hinter Fl\u00fcssen")]
    [InlineData("\u6771\u4eac\u306e\u9752\u3044\u7a7a\u3068\u767d\u3044\u96f2\u304c\u597d\u304d\u3067\u3059")]
    [InlineData("       twelve grey otters       ")]
    public void Long_phrases_of_any_language_are_taken_without_rules_of_composition(string password) =>
        Assert.Empty(PasswordPolicy.Check(password, "/password", Context));

    [Fact]
    public void Fifteen_characters_are_the_fewest_and_more_than_sixty_four_are_taken()
    {
        Assert.Equal("password-too-short", Assert.Single(PasswordPolicy.Check("qz7 vu3 xk9 wm", "/password", Context)).Code);
        Assert.Empty(PasswordPolicy.Check("qz7 vu3 xk9 wmp", "/password", Context));
        Assert.Empty(PasswordPolicy.Check(string.Join(' ', Enumerable.Repeat("slow heron under slate", 4)) + " and one kettle", "/password", Context));
        Assert.Equal("password-too-long", Assert.Single(PasswordPolicy.Check(new string('q', 257), "/password", Context)).Code);
    }

    [Fact]
    public void Characters_are_counted_as_code_points_after_normalisation()
    {
        // Fourteen letters, one of them written as a letter and a combining mark: fifteen code points before NFC, fourteen after.
        Assert.Equal("password-too-short", Assert.Single(PasswordPolicy.Check("u\u0308bzvqkxwrtpnmd", "/password", Context)).Code);
        Assert.Equal("\u00fc", PasswordPolicy.Normalise("u\u0308"));
    }

    [Theory]
    [InlineData("passwordpassword")]
    [InlineData("aaaaaaaaaaaaaaaaaaaa")]
    [InlineData("123456789012345")]
    [InlineData("qwertyuiopasdfghjkl")]
    [InlineData("iloveyouiloveyou")]
    [InlineData("labwatch-hollin-vale")]
    [InlineData("hollin vale lab watch")]
    [InlineData("Kim Lee Kim Lee 2026")]
    public void Common_expected_and_context_words_are_refused(string password) =>
        Assert.Equal("password-expected", Assert.Single(PasswordPolicy.Check(password, "/password", Context)).Code);

    [Theory]
    [InlineData("line\nbreak in the middle")]
    [InlineData("half a pair \ud800 of surrogates")]
    public void What_is_no_text_is_no_password(string password) =>
        Assert.Equal("not-a-password", Assert.Single(PasswordPolicy.Check(password, "/password", Context)).Code);

    [Fact]
    public void A_finding_never_repeats_the_password() =>
        Assert.All(
            PasswordPolicy.Check("passwordpassword", "/password", Context).Concat(PasswordPolicy.Check("short", "/password", Context)),
            finding => Assert.DoesNotContain("short", finding.Value ?? string.Empty, StringComparison.Ordinal));

    [Fact]
    public void One_time_passwords_are_not_refused_by_the_policy_and_differ()
    {
        string[] drawn = [.. Enumerable.Range(0, 50).Select(_ => OneTimePassword.Draw())];
        Assert.Equal(50, drawn.Distinct(StringComparer.Ordinal).Count());
        Assert.All(drawn, password => Assert.Empty(PasswordPolicy.Check(password, "/password", Context)));
        Assert.All(drawn, password => Assert.True(Encoding.ASCII.GetByteCount(password) == 23));
    }
}
