using System.Threading.RateLimiting;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Requests;

namespace LabWatch.Service.Api.Accounts;

/// <summary>
/// How much one caller or address may ask. The framework drops the counter of whoever is quiet, so memory follows those who are busy. What
/// one account may be tried is <see cref="SignInThrottle"/>'s.
/// </summary>
internal static class RateLimits
{
    /// <summary>Policy of what checks a password: twenty a minute from one address.</summary>
    public const string SignIn = "sign-in";

    /// <summary>Policy of the set-up: five a minute from one address.</summary>
    public const string SetUp = "set-up";

    private const int BurstOfCaller = 300;
    private const int EachSecondOfCaller = 100;
    private const int BurstOfStranger = 100;
    private const int EachSecondOfStranger = 20;

    /// <summary>Adds the limits.</summary>
    public static void Add(IServiceCollection services) => services.AddRateLimiter(options =>
    {
        options.RejectionStatusCode = StatusCodes.Status429TooManyRequests;
        options.AddPolicy(SignIn, static http => EachMinute(http, 20));
        options.AddPolicy(SetUp, static http => EachMinute(http, 5));
        options.GlobalLimiter = PartitionedRateLimiter.Create<HttpContext, string>(static http => Caller.Find(http) is { } caller
            ? Steady("account " + caller.Name, BurstOfCaller, EachSecondOfCaller)
            : Steady("address " + ClientAddress.Network(http), BurstOfStranger, EachSecondOfStranger));
        options.OnRejected = static async (rejected, _) =>
        {
            TimeSpan wait = rejected.Lease.TryGetMetadata(MetadataName.RetryAfter, out TimeSpan after) ? after : TimeSpan.FromSeconds(1);
            Refusals.RetryAfter(rejected.HttpContext, wait);
            await Refusals.TooMany("too-many-requests", "Too many requests.", "Wait as long as Retry-After says.").ExecuteAsync(rejected.HttpContext);
        };
    });

    private static RateLimitPartition<string> EachMinute(HttpContext http, int permits) => RateLimitPartition.GetSlidingWindowLimiter(
        ClientAddress.Network(http),
        _ => new SlidingWindowRateLimiterOptions { PermitLimit = permits, Window = TimeSpan.FromMinutes(1), SegmentsPerWindow = 6, QueueLimit = 0 });

    private static RateLimitPartition<string> Steady(string key, int burst, int eachSecond) => RateLimitPartition.GetTokenBucketLimiter(
        key,
        _ => new TokenBucketRateLimiterOptions { TokenLimit = burst, TokensPerPeriod = eachSecond, ReplenishmentPeriod = TimeSpan.FromSeconds(1), QueueLimit = 0 });
}
