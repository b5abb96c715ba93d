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
        if (source.Key == target.Key && from.Definition.Ellipsoid.IsLike(to.Definition.Ellipsoid))
        {
            return new DatumOperation("", $"none needed, both on {source.Name}", 0, IsTakenAsIs: false);
        }

        if (NullChain(from, to) is { } chain)
        {
            return Describe(chain, from, to);
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

    private static DatumOperation Describe(OperationEntry[] chain, KnownSystem from, KnownSystem to)
    {
        var names = string.Join(", then ", chain.Select(step => $"{step.Name} ({step.Code})"));
        var accuracy = chain.Sum(step => step.AccuracyMetres);
        var better = chain.Length > 1 ? Candidates(from, to).FirstOrDefault(one => Leads(one, from, to)) : null;
        var remark = better is null
            ? ""
            : FormattableString.Invariant(
                $"; also published but not applied: {better.Name} ({better.Code}), {better.AccuracyMetres:0.###} m"
            );
        return new DatumOperation(
            string.Join(" + ", chain.Select(step => step.Code)),
            FormattableString.Invariant($"{names}: null transformation, stated accuracy {accuracy:0.###} m{remark}"),
            accuracy,
            IsTakenAsIs: false
        );
    }

    /// <summary>The shortest way over one or two null transformations, the most accurate of those; null where there is none.</summary>
    private static OperationEntry[]? NullChain(KnownSystem from, KnownSystem to)
    {
        var (source, target) = (from.Definition.Datum.Key, to.Definition.Datum.Key);
        var nulls = Suiting(from, to).Where(one => one.Kind == OperationKind.Null).ToArray();
        var direct = nulls.Where(one => Leads(one, from, to)).Select(one => new[] { one });
        var hops =
            from first in nulls
            let middle = Other(first, source)
            where middle is not null
            from second in nulls
            where Other(second, middle) == target
            select new[] { first, second };
        return direct
            .Concat(hops)
            .OrderBy(chain => chain.Length)
            .ThenBy(chain => chain.Sum(step => step.AccuracyMetres))
            .FirstOrDefault();
    }

    /// <summary>Published operations other than null ones that would bridge the two, the most accurate first.</summary>
    private static OperationEntry[] Candidates(KnownSystem from, KnownSystem to)
    {
        var (source, target) = (from.Definition.Datum.Key, to.Definition.Datum.Key);
        var suiting = Suiting(from, to).ToArray();
        var sourceIsLikeWgs84 = IsLikeWgs84(suiting, source);
        var targetIsLikeWgs84 = IsLikeWgs84(suiting, target);
        return
        [
            .. suiting
                .Where(one => one.Kind != OperationKind.Null)
                .Where(one =>
                    Leads(one, from, to)
                    || (targetIsLikeWgs84 && Other(one, source) == Wgs84)
                    || (sourceIsLikeWgs84 && Other(one, target) == Wgs84)
                )
                .OrderBy(one => Leads(one, from, to) ? 0 : 1)
                .ThenBy(one => one.AccuracyMetres),
        ];
    }

    private static bool IsLikeWgs84(OperationEntry[] suiting, string datum) =>
        datum == Wgs84 || suiting.Any(one => one.Kind == OperationKind.Null && Other(one, datum) == Wgs84);

    private static IEnumerable<OperationEntry> Suiting(KnownSystem from, KnownSystem to) =>
        RegistryTable.Operations.Where(one => one.Area.Meets(from.Area) && one.Area.Meets(to.Area));

    private static bool Leads(OperationEntry operation, KnownSystem from, KnownSystem to) =>
        Other(operation, from.Definition.Datum.Key) == to.Definition.Datum.Key;

    /// <summary>The datum at the other end of an operation; null where it does not touch the one given.</summary>
    private static string? Other(OperationEntry operation, string datum)
    {
        var (source, target) = (FrameOf(operation.Source), FrameOf(operation.Target));
        return source == datum ? target
            : target == datum ? source
            : null;
    }

    private static string FrameOf(string datum) => RegistryTable.Datums[datum].Frame;

    /// <summary>How far the published operations move places: a bound on the error of moving none.</summary>
    private static string Error(KnownSystem from, KnownSystem to)
    {
        if (Candidates(from, to).Max(one => one.FurthestMetres) is not { } furthest)
        {
            return "up to several hundred metres";
        }

        var round = furthest < 10 ? Math.Ceiling(furthest + 0.5) : Math.Ceiling(furthest / 10) * 10;
        return FormattableString.Invariant($"up to about {round} m");
    }

    private static RefusedException Refuse(KnownSystem from, KnownSystem to)
    {
        var candidates = Candidates(from, to)
            .Take(MostCandidates)
            .Select(one =>
                FormattableString.Invariant($"{one.Code} {one.Name}, {one.AccuracyMetres:0.###} m")
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
