using System.Collections.Immutable;

namespace RecipeRunner.Model.Space;

/// <summary>The kind of geometry that all features of a layer have.</summary>
public enum GeometryKind
{
    /// <summary>A place each.</summary>
    Point,

    /// <summary>An areal shape each.</summary>
    Region,
}

/// <summary>The geometry of one feature: a place or a region.</summary>
public readonly record struct Shape
{
    /// <summary>A place.</summary>
    public Shape(Location place) => Place = place;

    /// <summary>An areal shape.</summary>
    public Shape(Region region) => Region = region;

    /// <summary>The place, for a point layer.</summary>
    public Location Place { get; }

    /// <summary>The region, for a region layer; null for a point layer.</summary>
    public Region? Region { get; }
}

/// <summary>Features ready to be written: a geometry and a row of attributes each.</summary>
/// <param name="Kind">The kind of all geometries.</param>
/// <param name="Shapes">A geometry a feature.</param>
/// <param name="Attributes">A row a feature, in the same order.</param>
public sealed record FeatureTable(GeometryKind Kind, ImmutableArray<Shape> Shapes, Table Attributes);

/// <summary>An artifact that can be drawn on a map and written as a layer.</summary>
public interface IMapLayer
{
    /// <summary>The system of all coordinates.</summary>
    ReferenceSystem ReferenceSystem { get; }

    /// <summary>The features with their attributes, in a fixed order.</summary>
    FeatureTable ToFeatures();
}
