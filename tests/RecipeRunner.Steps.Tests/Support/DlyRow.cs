using System.Globalization;
using System.Text;

namespace RecipeRunner.Steps.Tests.Support;

/// <summary>Rows of a .dly file, made by the table of columns of NOAA's GHCN-Daily readme.txt, section III.</summary>
public static class DlyRow
{
    /// <summary>The readme's own example of an id: Phoenix airport, section I.</summary>
    public const string Station = "USC00026481";

    /// <summary>A row of values by the table of columns: id 1-11, year 12-15, month 16-17, element 18-21, value 22-26, flags 27, 28, 29, and so on.</summary>
    public static string Of(int year, int month, string element, params (int Day, string Value)[] values)
    {
        var row = new StringBuilder(
            string.Create(CultureInfo.InvariantCulture, $"{Station}{year:0000}{month:00}{element}")
        );
        for (var day = 1; day <= 31; day++)
        {
            row.Append(values.FirstOrDefault(value => value.Day == day).Value ?? "-9999   ");
        }

        return row.ToString();
    }
}
