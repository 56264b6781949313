namespace LabWatch.Service.Hosting;

/// <summary>How storing stands at one moment.</summary>
/// <param name="Trouble">Why the store took no readings at its last attempt; null while it takes them.</param>
/// <param name="CommitsStopped">Whether nothing can be made durable, not even in the buffer.</param>
/// <param name="Buffered">Messages in the buffer.</param>
/// <param name="FreeBytes">Bytes free on the disk of the data directory; null where that is not known.</param>
/// <param name="DiskBytes">Size of that disk; null where it is not known.</param>
/// <param name="Damage">How many pieces of the store were found damaged or missing.</param>
internal readonly record struct StorageState(string? Trouble, bool CommitsStopped, long Buffered, long? FreeBytes, long? DiskBytes, int Damage);
