using System.Globalization;
using RecipeRunner.EndToEnd.Tests.Running;
using RecipeRunner.Host.Sealing;

namespace RecipeRunner.EndToEnd.Tests.Sealing;

/// <summary>A disk that fills up, and places that cannot be written, while an earlier study stands there: it stays whole.</summary>
public sealed class FullDiskTests(OldStudy old) : IClassFixture<OldStudy>, IDisposable
{
    private readonly Tool tool = new();
    private bool mounted;

    private string Disk => tool.PathOf("disk");

    private string Study => Path.Combine(Disk, "many.study");

    public void Dispose()
    {
        if (mounted)
        {
            Unmount();
        }

        tool.Dispose();
    }

    /// <summary>Room beside the earlier study for a share of the new one, so that it runs out among inputs, layers and the seal.</summary>
    [Fact]
    public void A_disk_that_fills_up_anywhere_leaves_the_earlier_study_and_nothing_else()
    {
        Assert.SkipUnless(Environment.UserName == "root", "only root can mount a small disk");
        var size = KilobytesOf(old.Folder);
        var failures = 0;
        foreach (var share in new[] { 0.01, 0.1, 0.5, 0.9, 0.96, 0.99, 1.2 })
        {
            Mount((int)(size * (1 + share)));
            var said = tool.Run(old.Run("new", Study));

            failures += said.ExitCode == 0 ? 0 : 1;
            if (said.ExitCode != 0)
            {
                said.Errors.ShouldContain("error RR0704: ");
                said.Errors.ShouldEndWith("nothing was written\n");
            }

            SealCheck.Of(Study, CancellationToken.None).ShouldBeEmpty();
            Directory.GetFileSystemEntries(Disk).ShouldBe([Study]);
            Unmount();
        }

        failures.ShouldBeInRange(4, 6, "the shares must span from too little to enough");
    }

    /// <summary>Permissions do not bind root, so the disk itself is made unwritable.</summary>
    [Fact]
    public void A_place_that_cannot_be_written_keeps_what_it_holds()
    {
        Assert.SkipUnless(Environment.UserName == "root", "only root can make a disk that is not to be written");
        Mount(3 * KilobytesOf(old.Folder));
        Remount("ro");

        tool.Run(old.Run("new", Study)).Errors.ShouldStartWith("error RR0704");

        SealCheck.Of(Study, CancellationToken.None).ShouldBeEmpty();
        Remount("rw");
        File.WriteAllText(Study + ".making", "in the way");
        tool.Run(old.Run("new", Study)).Errors.ShouldContain("RR0706");
        SealCheck.Of(Study, CancellationToken.None).ShouldBeEmpty();
        File.ReadAllText(Study + ".making").ShouldBe("in the way");
    }

    private int KilobytesOf(string folder) =>
        int.Parse(
            tool.Command("du", "-sk", folder).Output.Split('\t')[0],
            NumberStyles.None,
            CultureInfo.InvariantCulture
        );

    private void Mount(int kilobytes)
    {
        Directory.CreateDirectory(Disk);
        Succeed("mount", "-t", "tmpfs", "-o", FormattableString.Invariant($"size={kilobytes}k"), "none", Disk);
        mounted = true;
        Succeed("cp", "-r", old.Folder, Study);
    }

    private void Remount(string how) => Succeed("mount", "-o", $"remount,{how}", Disk);

    private void Unmount()
    {
        Succeed("umount", Disk);
        mounted = false;
    }

    private void Succeed(string program, params string[] arguments)
    {
        var said = tool.Command(program, arguments);
        said.ExitCode.ShouldBe(0, said.Errors);
    }
}
