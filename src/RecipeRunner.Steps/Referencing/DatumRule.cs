using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// The rule for datums. One datum: nothing. A null transformation of the registry, or a chain of two: stated with its
/// accuracy. Anything else: refused, unless the recipe takes the coordinates as they are. There is never a silent shift and
/// never a silent lack of one.
/// </summary>
internal static class DatumRule
{
    private const string Wgs84 = "6326";
    private const int MostCandidates = 5;

    /// <summary>How coordinates get from one system's datum to the other's.</summary>
    /// <exception cref="RefusedException">RR0320: by no way that the recipe accepts.</exception>
    public static DatumOperation Decide(KnownSystem from, KnownSystem to, DatumChoice choice)
    {
        var (source, target) = (from.Definition.Datum, to.Definition.Datum);
        if (source.Key == target.Key)
        {
            return new DatumOperation("", $"none needed, both on {source.Name}", 0, IsTakenAsIs: false);
        }

        if (NullChain(from, to) is { } chain)
        {
            var names = string.Join(", then ", chain.Select(step => $"{step.Name} ({step.Code})"));
            var accuracy = chain.Sum(step => step.AccuracyMetres);
            return new DatumOperation(
                string.Join(" + ", chain.Select(step => step.Code)),
                FormattableString.Invariant($"{names}: null transformation, stated accuracy {accuracy} m"),
                accuracy,
                IsTakenAsIs: false
            );
        }

        return choice == DatumChoice.TakeAsIs
            ? new DatumOperation(
                "",
                $"coordinates on {source.Name} taken as if on {target.Name}; they may be off by {Error(from, to)}",
                null,
                IsTakenAsIs: true
            )
            : throw Refuse(from, to);
    }

    /// <summary>The most accurate way over one or two null transformations; null where there is none.</summary>
    private static OperationEntry[]? NullChain(KnownSystem from, KnownSystem to)
    {
        var (source, target) = (from.Definition.Datum.Key, to.Definition.Datum.Key);
        var nulls = RegistryTable
            .Operations.Where(one =>
                one.Kind == OperationKind.Null && one.Area.Meets(from.Area) && one.Area.Meets(to.Area)
            )
            .ToArray();
        var direct = nulls.Where(one => Other(one, source) == target).Select(one => new[] { one });
        var hops =
            from first in nulls
            let middle = Other(first, source)
            where middle is not null
            from second in nulls
            where Other(second, middle) == target
            select new[] { first, second };
        return direct
            .Concat(hops)
            .OrderBy(chain => chain.Sum(step => step.AccuracyMetres))
            .ThenBy(chain => chain.Length)
            .FirstOrDefault();
    }

    /// <summary>The datum at the other end of an operation; null where it does not touch the one given.</summary>
    private static string? Other(OperationEntry operation, string datum)
    {
        var (source, target) = (FrameOf(operation.Source), FrameOf(operation.Target));
        return source == datum ? target
            : target == datum ? source
            : null;
    }

    private static string FrameOf(string datum) => RegistryTable.Datums[datum].Frame;

    /// <summary>Published operations between the two, or between either and WGS 84, that suit the target's area.</summary>
    private static OperationEntry[] Candidates(KnownSystem from, KnownSystem to)
    {
        var (source, target) = (from.Definition.Datum.Key, to.Definition.Datum.Key);
        var suiting = RegistryTable
            .Operations.Where(one =>
                one.Kind != OperationKind.Null && one.Area.Meets(from.Area) && one.Area.Meets(to.Area)
            )
            .ToArray();
        var direct = suiting.Where(one => Other(one, source) == target);
        var overWgs84 = suiting.Where(one => Other(one, source) == Wgs84 || Other(one, target) == Wgs84);
        return [.. direct.Concat(overWgs84).Distinct()];
    }

    private static string Error(KnownSystem from, KnownSystem to)
    {
        var furthest = Candidates(from, to).Max(one => one.FurthestMetres);
        return furthest is { } metres
            ? FormattableString.Invariant($"up to about {Math.Max(10, Math.Ceiling(metres / 10) * 10)} m")
            : "up to several hundred metres";
    }

    private static RefusedException Refuse(KnownSystem from, KnownSystem to)
    {
        var candidates = Candidates(from, to)
            .OrderBy(one => one.AccuracyMetres)
            .Take(MostCandidates)
            .Select(one =>
                FormattableString.Invariant($"{one.Code} {one.Name}, {one.AccuracyMetres} m")
                + (one.Kind == OperationKind.Grid ? ", needs a grid file" : "")
            )
            .ToArray();
        var known =
            candidates.Length > 0
                ? $"Published for the area, but not applied here: {string.Join("; ", candidates)}."
                : "The registry publishes no operation between the two for the area.";
        return new RefusedException(
            Finding.Error(
                "RR0320",
                Place.Of($"{from.Facts.Label} to {to.Facts.Label}"),
                $"{from.Facts.Label} is on the datum {from.Definition.Datum.Name} and {to.Facts.Label} on "
                    + $"{to.Definition.Datum.Name}; no null transformation leads from one to the other. {known}",
                $"Bring the data to the datum {to.Definition.Datum.Name} first. If an error of {Error(from, to)} does not "
                    + "matter, accept it: datum: DatumChoice.TakeAsIs"
            )
        );
    }
}
