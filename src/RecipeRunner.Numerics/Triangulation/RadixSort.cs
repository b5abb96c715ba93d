namespace RecipeRunner.Numerics.Triangulation;

/// <summary>
/// Sorts whole-number keys by counting, twelve bits a pass: linear in their number, and stable. A few keys are inserted one
/// after the other instead, as the counters would outnumber them.
/// </summary>
internal static class RadixSort
{
    private const int DigitBits = 12;
    private const int Digits = 1 << DigitBits;
    private const int Few = 64;

    /// <summary>Sorts <paramref name="keys"/> ascending in place and returns which original place each came from.</summary>
    /// <param name="keys">Keys; bits above <paramref name="keyBits"/> are zero.</param>
    /// <param name="keyBits">How many low bits of a key are used.</param>
    public static int[] Sort(ulong[] keys, int keyBits)
    {
        var places = new int[keys.Length];
        for (int i = 0; i < places.Length; i++)
        {
            places[i] = i;
        }

        if (keys.Length <= Few)
        {
            Insert(keys, places);
            return places;
        }

        ulong[] toKeys = new ulong[keys.Length];
        int[] toPlaces = new int[keys.Length];
        ulong[] fromKeys = keys;
        for (int shift = 0; shift < keyBits; shift += DigitBits)
        {
            Pass(fromKeys, places, toKeys, toPlaces, shift);
            (fromKeys, toKeys) = (toKeys, fromKeys);
            (places, toPlaces) = (toPlaces, places);
        }

        if (!ReferenceEquals(fromKeys, keys))
        {
            fromKeys.CopyTo(keys, 0);
        }

        return places;
    }

    private static void Insert(ulong[] keys, int[] places)
    {
        for (int i = 1; i < keys.Length; i++)
        {
            (ulong key, int place) = (keys[i], places[i]);
            int to = i;
            for (; to > 0 && keys[to - 1] > key; to--)
            {
                (keys[to], places[to]) = (keys[to - 1], places[to - 1]);
            }

            (keys[to], places[to]) = (key, place);
        }
    }

    private static void Pass(ulong[] fromKeys, int[] fromPlaces, ulong[] toKeys, int[] toPlaces, int shift)
    {
        var next = new int[Digits];
        foreach (ulong key in fromKeys)
        {
            next[(int)(key >> shift) & (Digits - 1)]++;
        }

        int sum = 0;
        for (int digit = 0; digit < next.Length; digit++)
        {
            (next[digit], sum) = (sum, sum + next[digit]);
        }

        for (int i = 0; i < fromKeys.Length; i++)
        {
            int to = next[(int)(fromKeys[i] >> shift) & (Digits - 1)]++;
            toKeys[to] = fromKeys[i];
            toPlaces[to] = fromPlaces[i];
        }
    }
}
