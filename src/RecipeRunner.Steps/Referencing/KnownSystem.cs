using System.Collections.Concurrent;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>A reference system that has been checked and can be computed with.</summary>
internal sealed class KnownSystem
{
    /// <summary>How far a control point may be missed.</summary>
    public const double WorstControlMetres = 0.01;

    private static readonly ConcurrentDictionary<string, KnownSystem> ByCode = new(StringComparer.Ordinal);
    private static readonly ConcurrentDictionary<string, KnownSystem> ByWkt = new(StringComparer.Ordinal);

    private KnownSystem(string code, string name, string wkt, SystemDefinition definition, AreaOfUse area)
    {
        Definition = definition;
        Area = area;
        Projection = definition.Form is null ? null : new GridProjection(definition.Ellipsoid, definition.Form);
        Facts = new ReferenceSystem
        {
            Code = code,
            Name = name,
            Kind = definition.Kind,
            Datum = definition.Datum.Name,
            UnitName = definition.UnitName,
            MetresPerUnit = definition.MetresPerUnit,
            Wkt = wkt,
        };
    }

    /// <summary>What recipes and steps see of it.</summary>
    public ReferenceSystem Facts { get; }

    /// <summary>What its definition says.</summary>
    public SystemDefinition Definition { get; }

    /// <summary>Where it is meant to be used.</summary>
    public AreaOfUse Area { get; }

    /// <summary>Its projection; null for a geographic system.</summary>
    public GridProjection? Projection { get; }

    /// <summary>The system that a recipe, a reader or an artifact speaks of.</summary>
    /// <exception cref="RefusedException">It cannot be computed with.</exception>
    public static KnownSystem Of(ReferenceSystem facts) =>
        facts.Code.Length > 0
            ? OfEntry(RegistryTable.Systems[facts.Code["EPSG:".Length..]])
            : ByWkt.GetOrAdd(facts.Wkt, wkt => OfText(wkt, facts.Label));

    /// <summary>A system of the registry.</summary>
    /// <exception cref="RefusedException">Its definition is not understood, or its control points are not met.</exception>
    public static KnownSystem OfEntry(SystemEntry entry) =>
        ByCode.GetOrAdd(entry.Code, static (_, entry) => Check(entry), entry);

    /// <summary>A system that only a file defines.</summary>
    /// <param name="wkt">The text of the file.</param>
    /// <param name="file">The file, for messages.</param>
    /// <exception cref="RefusedException">The definition is not understood, or the projection does not prove itself.</exception>
    public static KnownSystem OfText(string wkt, string file)
    {
        var definition = new DefinitionReader(new Place(file), DefinitionReader.MendOfFile).Read(
            WktReader.Read(wkt, file)
        );
        var area = PlaneProof.AreaOf(definition);
        var system = new KnownSystem("", definition.Name, wkt.Trim(), definition, area);
        PlaneProof.Check(system, file);
        return system;
    }

    private static KnownSystem Check(SystemEntry entry)
    {
        if (entry.IsDeprecated)
        {
            throw Refuse(
                "RR0303",
                entry,
                "has been withdrawn from the registry, and withdrawn definitions can be faulty"
            );
        }

        if (!CanCompute(entry))
        {
            throw Refuse("RR0303", entry, $"uses the method {entry.Method}, which cannot be computed here");
        }

        var definition = entry.ReadDefinition();
        if (definition.Form is null && definition.DegreesPerUnit != 1)
        {
            throw Refuse("RR0303", entry, $"counts its angles in {definition.UnitName}s instead of degrees");
        }

        var system = new KnownSystem(entry.Code, entry.Name, entry.Wkt, definition, entry.Area);
        var miss = entry.Controls.Select(system.Miss).DefaultIfEmpty(0).Max();
        return miss <= WorstControlMetres
            ? system
            : throw Refuse(
                "RR0304",
                entry,
                FormattableString.Invariant(
                    $"misses a control point of the registry by {miss:G3} m, more than the {WorstControlMetres} m allowed, with its method {entry.Method}"
                )
            );
    }

    private static bool CanCompute(SystemEntry entry) =>
        entry.Method.Length == 0
        || (
            entry.Controls.Length > 0
            && WktReader.Read(entry.Wkt, entry.Code).Child("PROJECTION") is { } projection
            && PlaneMethods.Knows(projection.Name)
        );

    /// <summary>By how many metres a control point is missed; infinite where it has no image.</summary>
    internal double Miss(ControlPoint control)
    {
        var plane = Projection!.ToPlane(control.Degrees);
        var unit = Definition.MetresPerUnit;
        var miss = plane.DistanceTo(new Location(control.Plane.X * unit, control.Plane.Y * unit));
        return double.IsNaN(miss) ? double.PositiveInfinity : miss;
    }

    private static RefusedException Refuse(string code, SystemEntry entry, string why) =>
        new(
            Finding.Error(
                code,
                Place.Of(entry.Code),
                $"{entry.Code} ({entry.Name}) cannot be used: it {why}.",
                UtmZone.Suggest(entry.Area)
            )
        );
}
