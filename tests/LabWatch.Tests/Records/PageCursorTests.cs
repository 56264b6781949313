using LabWatch.Records;

namespace LabWatch.Tests.Records;

public sealed class PageCursorTests
{
    [Theory]
    [InlineData(0, 0)]
    [InlineData(-1, long.MaxValue)]
    [InlineData(long.MinValue, 1)]
    public void A_cursor_reads_back(long time, long number)
    {
        Assert.True(PageCursor.TryParse(new PageCursor(time, number).ToString(), out PageCursor cursor));
        Assert.Equal(new PageCursor(time, number), cursor);
    }

    [Theory]
    [InlineData(null)]
    [InlineData("")]
    [InlineData("AAAAAAAAAAAAAAAAAAAAA")]
    [InlineData("AAAAAAAAAAAAAAAAAAAA==")]
    [InlineData("'; DROP TABLE alerts--")]
    public void Other_text_is_no_cursor(string? text) => Assert.False(PageCursor.TryParse(text, out _));
}
