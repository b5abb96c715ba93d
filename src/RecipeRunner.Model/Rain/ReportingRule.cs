using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Rain;

/// <summary>
/// What must report at a step for a basin's value to be given; below it the value is withheld, not guessed. Rules are joined
/// with <c>&amp;</c>: <c>AtLeast.Percent(60) &amp; AtLeast.Gauges(2) &amp; Within.Kilometres(30)</c>.
/// </summary>
public abstract record ReportingRule : ISettingValue
{
    private protected ReportingRule() { }

    /// <summary>Any gauge of the network is enough.</summary>
    public static ReportingRule Any { get; } = new AllRules([]);

    /// <summary>Both rules at once.</summary>
    public static ReportingRule operator &(ReportingRule left, ReportingRule right) =>
        new AllRules([.. left.Parts, .. right.Parts]);

    /// <summary>True where enough reports, forgiving the last bits of a sum.</summary>
    /// <param name="gauges">Gauges with weight in the full network that report.</param>
    /// <param name="share">The share of the basin's weight in the full network that reports, 0 to 1.</param>
    /// <param name="nearestMetres">Distance from the basin (0 inside) to the nearest gauge that reports.</param>
    public abstract bool IsMetBy(int gauges, double share, double nearestMetres);

    /// <inheritdoc/>
    public abstract string ToSettingText();

    /// <inheritdoc/>
    public sealed override string ToString() => ToSettingText();

    private protected virtual ImmutableArray<ReportingRule> Parts => [this];

    private sealed record AllRules(ImmutableArray<ReportingRule> Rules) : ReportingRule
    {
        private protected override ImmutableArray<ReportingRule> Parts => Rules;

        public override bool IsMetBy(int gauges, double share, double nearestMetres) =>
            Rules.All(rule => rule.IsMetBy(gauges, share, nearestMetres));

        public override string ToSettingText() =>
            Rules.IsEmpty ? "any gauge" : string.Join(" and ", Rules.Select(rule => rule.ToSettingText()));
    }
}

/// <summary>How many of a period's steps must have a value for the period to have one.</summary>
public interface ICompletenessRule : ISettingValue
{
    /// <summary>True where enough steps have a value.</summary>
    /// <param name="present">Steps that have a value.</param>
    /// <param name="expected">Steps that the period has by the calendar.</param>
    bool IsMetBy(int present, int expected);
}

/// <summary>A share, of weight or of steps.</summary>
public sealed record ShareRule : ReportingRule, ICompletenessRule
{
    internal ShareRule(double share) => Share = share;

    /// <summary>The share, 0 to 1.</summary>
    public double Share { get; }

    /// <inheritdoc/>
    public override bool IsMetBy(int gauges, double share, double nearestMetres) => share >= Share - 1e-12;

    /// <inheritdoc/>
    public bool IsMetBy(int present, int expected) => present >= (Share * expected) - 1e-9;

    /// <inheritdoc/>
    public override string ToSettingText() =>
        string.Create(CultureInfo.InvariantCulture, $"at least {Share * 100:0.############} %");
}

/// <summary>A number of gauges.</summary>
public sealed record GaugeCountRule : ReportingRule
{
    internal GaugeCountRule(int count) => Count = count;

    /// <summary>The least number of gauges, 1 or more.</summary>
    public int Count { get; }

    /// <inheritdoc/>
    public override bool IsMetBy(int gauges, double share, double nearestMetres) => gauges >= Count;

    /// <inheritdoc/>
    public override string ToSettingText() => $"at least {Counted.Of(Count, "gauge")}";
}

/// <summary>A distance.</summary>
public sealed record DistanceRule : ReportingRule
{
    /// <summary>Less than the lattice of coordinates: kilometres times a thousand, and roots, are a little off.</summary>
    private const double LastBits = 1e-6;

    internal DistanceRule(double metres) => Metres = metres;

    /// <summary>The largest distance in metres, 0 or more.</summary>
    public double Metres { get; }

    /// <inheritdoc/>
    public override bool IsMetBy(int gauges, double share, double nearestMetres) => nearestMetres <= Metres + LastBits;

    /// <inheritdoc/>
    public override string ToSettingText() =>
        string.Create(CultureInfo.InvariantCulture, $"a gauge within {Metres / 1000:0.######} km");
}

/// <summary>A number of steps.</summary>
public sealed record StepCountRule : ICompletenessRule
{
    internal StepCountRule(int count) => Count = count;

    /// <summary>The least number of steps, 1 or more; of a shorter period, all.</summary>
    public int Count { get; }

    /// <inheritdoc/>
    public bool IsMetBy(int present, int expected) => present >= Math.Min(Count, expected);

    /// <inheritdoc/>
    public string ToSettingText() => $"at least {Counted.Of(Count, "step")}";

    /// <inheritdoc/>
    public override string ToString() => ToSettingText();
}
