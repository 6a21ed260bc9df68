using System.Globalization;
using RespDerive.Storage;

namespace RespDerive.Service;

/// <summary>Remembers when a store was first started: anchors before it are context and are not published.</summary>
internal static class FirstStart
{
    public const string Name = "first-start";

    public static async Task RememberAsync(Store store, DateTimeOffset now)
    {
        if (store.Cursor(Name) is null)
        {
            await store.SetCursorAsync(new Cursor(Name, now.ToString("O", CultureInfo.InvariantCulture)));
        }
    }
}
