using System.Diagnostics.CodeAnalysis;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Emitting;
using RecipeRunner.Steps.Reading;
using RecipeRunner.Steps.Referencing;

namespace RecipeRunner.Steps;

/// <summary>The verbs that a recipe can say without naming anything first.</summary>
public sealed class RecipeVerbs
{
    private readonly IStudy study;

    /// <summary>The verbs of one study.</summary>
    /// <param name="study">The study that the recipe makes.</param>
    public RecipeVerbs(IStudy study) => this.study = study;

    /// <summary>Sets the title that people see first.</summary>
    /// <param name="text">A few words: the region, the time, the question.</param>
    public void Title(string text) => study.Title(text);

    /// <summary>Adds a sentence to the summary: a purpose, an assumption, a remark.</summary>
    /// <param name="text">A whole sentence.</param>
    public void Note(string text) => study.Note(text);

    /// <summary>States where data come from, and under which licence; summary, audit and crate carry it.</summary>
    /// <param name="file">The file as the recipe reads it; with * or ? in its name, all files that fit, such as <c>basins.*</c>.</param>
    /// <param name="text">Who made the data and where they were had.</param>
    /// <param name="licence">The licence: its SPDX identifier such as <c>CC-BY-4.0</c>, its address, or its words.</param>
    /// <exception cref="RefusedException">The recipe reads no such file.</exception>
    public void Source(string file, string text, string? licence = null) => study.Source(file, text, licence);

    /// <summary>Declares a setting with its default; <c>--set name=value</c> overrides it.</summary>
    /// <typeparam name="T">Text, a whole number, a number, or yes/no.</typeparam>
    /// <param name="name">The setting's name.</param>
    /// <param name="default">The value where none is given.</param>
    /// <returns>The value to use.</returns>
    public T Setting<T>(string name, T @default)
        where T : notnull => study.Setting(name, @default);

    /// <summary>A reference system by its code in the EPSG registry.</summary>
    /// <param name="code">Such as <c>EPSG:32633</c>.</param>
    /// <exception cref="RefusedException">The code is unknown, or cannot be used safely.</exception>
    [SuppressMessage("Performance", "CA1822", Justification = "A verb that recipes say without naming a type first.")]
    public ReferenceSystem Crs(string code) => ReferenceSystems.Find(code);

    /// <inheritdoc cref="ReadBasinsStep"/>
    /// <param name="file">The file, relative to the data folder.</param>
    /// <param name="id">The column that holds each basin's unique id.</param>
    /// <param name="name">The column that holds names for people; the ids serve where not given.</param>
    /// <param name="crs">The reference system, where the file does not say it or says it wrongly.</param>
    public BasinLayer ReadBasins(string file, string id, string? name = null, ReferenceSystem? crs = null) =>
        study.Run(new ReadBasinsStep(file, id, name, crs));

    /// <inheritdoc cref="ReadGaugesStep"/>
    /// <param name="file">The file, relative to the data folder.</param>
    /// <param name="id">The column that holds each gauge's unique id, by which records name it.</param>
    /// <param name="x">For CSV: the column of eastings or longitudes.</param>
    /// <param name="y">For CSV: the column of northings or latitudes.</param>
    /// <param name="elevation">The column of heights above sea level in metres, where wanted.</param>
    /// <param name="crs">The reference system; a CSV file never says it.</param>
    public GaugeNetwork ReadGauges(
        string file,
        string id,
        string? x = null,
        string? y = null,
        string? elevation = null,
        ReferenceSystem? crs = null
    ) => study.Run(new ReadGaugesStep(file, id, x, y, elevation, crs));

    /// <inheritdoc cref="ReadRecordsStep"/>
    /// <param name="file">The file, relative to the data folder; with * or ? in its name, all files that fit, read as one.</param>
    /// <param name="unit">The unit of the depths.</param>
    /// <param name="step">The steps of time.</param>
    /// <param name="missing">Texts that mark a missing value beside the blank cell.</param>
    /// <param name="trace">Texts that mark rain too little to measure.</param>
    /// <param name="accumulating">Texts that mark a step whose rain is in the gauge's next value.</param>
    /// <param name="estimated">Letters after a number that mark it as estimated.</param>
    /// <param name="form">Which columns hold what; found from the first rows where not given.</param>
    public RainRecords ReadRecords(
        string file,
        RainUnit unit,
        TimeStep step,
        IReadOnlyList<string>? missing = null,
        IReadOnlyList<string>? trace = null,
        IReadOnlyList<string>? accumulating = null,
        IReadOnlyList<string>? estimated = null,
        RecordForm? form = null
    ) =>
        study.Run(
            new ReadRecordsStep(
                file,
                unit,
                step,
                [.. missing ?? []],
                [.. trace ?? []],
                [.. accumulating ?? []],
                [.. estimated ?? []],
                form
            )
        );

    /// <inheritdoc cref="ReadGhcnDailyStep"/>
    /// <param name="file">The file, relative to the data folder; with * or ? in its name, all files that fit, read as one.</param>
    /// <param name="step">The observation days.</param>
    /// <param name="gauges">The network whose gauges are wanted; all of the file's where not given.</param>
    public RainRecords ReadGhcnDaily(string file, TimeStep step, GaugeNetwork? gauges = null) =>
        study.Run(new ReadGhcnDailyStep(file, step, gauges));

    /// <inheritdoc cref="ReadGhcnStationsStep"/>
    /// <param name="file">The file, relative to the data folder.</param>
    /// <param name="of">Records whose gauges are wanted.</param>
    /// <param name="ids">The ids that are wanted; all of the file's, or of the records, where none is given.</param>
    public GaugeNetwork ReadGhcnStations(string file, RainRecords? of = null, IReadOnlyList<string>? ids = null) =>
        study.Run(new ReadGhcnStationsStep(file, of, [.. ids ?? []]));

    /// <inheritdoc cref="EmitLayerStep"/>
    /// <param name="layer">What to write: basins, gauges, cells, pieces, triangles.</param>
    /// <param name="name">The layer's name, such as <c>cells</c> or <c>cells.geojson</c>.</param>
    public EmittedFiles EmitLayer(IMapLayer layer, string name) => study.Run(new EmitLayerStep(layer, name));

    /// <inheritdoc cref="EmitTableStep"/>
    /// <param name="table">What to write: weights, areal rainfall, totals, coverage.</param>
    /// <param name="name">The table's name, without an ending.</param>
    public EmittedFiles EmitTable(ITabular table, string name) => study.Run(new EmitTableStep(table, name));
}
