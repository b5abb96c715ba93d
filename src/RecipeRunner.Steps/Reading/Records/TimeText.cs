using System.Globalization;
using NodaTime;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>How much of a time a text gives.</summary>
internal enum TimeDetail
{
    /// <summary>A year: <c>2024</c>.</summary>
    Year,

    /// <summary>A month: <c>2024-01</c>.</summary>
    Month,

    /// <summary>A date: <c>2024-01-31</c> or <c>20240131</c>.</summary>
    Date,

    /// <summary>A date and time of day: <c>2024-01-31T13:00</c>.</summary>
    Time,
}

/// <summary>A time as a file writes it (ISO 8601, basic or extended date), with a clock's offset from UTC where it gives one.</summary>
/// <param name="Time">The time; the first day or midnight where the text gives less.</param>
/// <param name="Detail">How much of it the text gives.</param>
/// <param name="IsEndOfDay">True where the text said 24:00; the time is then midnight of the next date.</param>
/// <param name="Offset">How far the clock is ahead of UTC, where the text says it.</param>
internal readonly record struct TimeText(LocalDateTime Time, TimeDetail Detail, bool IsEndOfDay, Offset? Offset)
{
    /// <summary>Reads a text.</summary>
    public static bool TryRead(ReadOnlySpan<char> text, out TimeText read)
    {
        read = default;
        if (!TryReadDate(text, out var date, out var detail, out var length))
        {
            return false;
        }

        if (length == text.Length)
        {
            read = new TimeText(date.AtMidnight(), detail, IsEndOfDay: false, null);
            return true;
        }

        return detail == TimeDetail.Date
            && text[length] is 'T' or ' '
            && TryReadClock(date, text[(length + 1)..], out read);
    }

    private static bool TryReadDate(ReadOnlySpan<char> text, out LocalDate date, out TimeDetail detail, out int length)
    {
        (date, detail, length) = (default, TimeDetail.Year, 4);
        if (!TryDigits(text, 0, 4, out var year))
        {
            return false;
        }

        var (month, day) = (1, 1);
        if (text.Length > 4 && text[4] == '-')
        {
            (detail, length) = (TimeDetail.Month, 7);
            if (!TryDigits(text, 5, 2, out month))
            {
                return false;
            }

            if (text.Length > 7 && text[7] == '-')
            {
                (detail, length) = (TimeDetail.Date, 10);
                if (!TryDigits(text, 8, 2, out day))
                {
                    return false;
                }
            }
        }
        else if (text.Length > 4)
        {
            (detail, length) = (TimeDetail.Date, 8);
            if (!TryDigits(text, 4, 2, out month) || !TryDigits(text, 6, 2, out day))
            {
                return false;
            }
        }

        if (year < 1 || month is < 1 or > 12 || day < 1 || day > CalendarSystem.Iso.GetDaysInMonth(year, month))
        {
            return false;
        }

        date = new LocalDate(year, month, day);
        return true;
    }

    private static bool TryReadClock(LocalDate date, ReadOnlySpan<char> text, out TimeText read)
    {
        read = default;
        if (
            !TryDigits(text, 0, 2, out var hour)
            || text.Length < 5
            || text[2] != ':'
            || !TryDigits(text, 3, 2, out var minute)
        )
        {
            return false;
        }

        var (second, length) = (0, 5);
        if (text.Length > 5 && text[5] == ':')
        {
            length = 8;
            if (!TryDigits(text, 6, 2, out second))
            {
                return false;
            }
        }

        length += ZeroFraction(text[length..]);
        if (
            !TryReadOffset(text[length..], out var offset)
            || minute > 59
            || second > 59
            || hour > 24
            || (hour == 24 && minute + second > 0)
        )
        {
            return false;
        }

        var time = hour == 24 ? date.PlusDays(1).AtMidnight() : date + new LocalTime(hour, minute, second);
        read = new TimeText(time, TimeDetail.Time, hour == 24, offset);
        return true;
    }

    /// <summary>The length of a fraction of a second that is zero, as programs write it.</summary>
    private static int ZeroFraction(ReadOnlySpan<char> text) =>
        text.Length >= 2 && text[0] == '.' && text[1] == '0' ? 1 + LengthOfZeros(text[1..]) : 0;

    private static int LengthOfZeros(ReadOnlySpan<char> text)
    {
        var other = text.IndexOfAnyExcept('0');
        return other < 0 ? text.Length : other;
    }

    private static bool TryReadOffset(ReadOnlySpan<char> text, out Offset? offset)
    {
        offset = null;
        if (text.IsEmpty)
        {
            return true;
        }

        if (text is "Z")
        {
            offset = NodaTime.Offset.Zero;
            return true;
        }

        var minutesAt = text.Length == 6 && text[3] == ':' ? 4 : 3;
        var minutes = 0;
        if (
            text[0] is not ('+' or '-')
            || text.Length is not (3 or 5 or 6)
            || !TryDigits(text, 1, 2, out var hours)
            || (text.Length > 3 && (text.Length != minutesAt + 2 || !TryDigits(text, minutesAt, 2, out minutes)))
            || hours > 14
            || minutes > 59
        )
        {
            return false;
        }

        var all = (hours * 60) + minutes;
        offset = NodaTime.Offset.FromSeconds((text[0] == '-' ? -all : all) * 60);
        return true;
    }

    private static bool TryDigits(ReadOnlySpan<char> text, int start, int count, out int number)
    {
        number = 0;
        return text.Length >= start + count
            && int.TryParse(text.Slice(start, count), NumberStyles.None, CultureInfo.InvariantCulture, out number);
    }
}
