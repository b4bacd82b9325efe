namespace BarbuleOptics.Color;

/// <summary>The components S0, S1, S2 of daylight, 300 to 830 nm at 10 nm.</summary>
/// <remarks>
/// <para>Source: CIE 015, table of the components of relative spectral distribution of daylight (after Judd, MacAdam and Wyszecki 1964).
/// Relative power, no unit; one decimal, as published. Between the rows CIE prescribes straight lines.</para>
/// <para>Entered from memory. Verified through D50 and D65 at 1 nm from 360 to 780 nm against the program spec2cie (Argyll, Debian 2.3.1):
/// see Published/IlluminantTests. Rows outside that span (ultraviolet and infrared) rest on memory.</para>
/// </remarks>
internal static class DaylightComponents
{
    public const int FirstNm = 300;
    public const int LastNm = 830;
    public const int StepNm = 10;

    /// <summary>S0, S1, S2 of 300 nm, then of 310 nm, and so on to 830 nm.</summary>
    public static ReadOnlySpan<double> Values =>
    [
        0.04, 0.02, 0.0, // 300
        6.0, 4.5, 2.0, // 310
        29.6, 22.4, 4.0, // 320
        55.3, 42.0, 8.5, // 330
        57.3, 40.6, 7.8, // 340
        61.8, 41.6, 6.7, // 350
        61.5, 38.0, 5.3, // 360
        68.8, 42.4, 6.1, // 370
        63.4, 38.5, 3.0, // 380
        65.8, 35.0, 1.2, // 390
        94.8, 43.4, -1.1, // 400
        104.8, 46.3, -0.5, // 410
        105.9, 43.9, -0.7, // 420
        96.8, 37.1, -1.2, // 430
        113.9, 36.7, -2.6, // 440
        125.6, 35.9, -2.9, // 450
        125.5, 32.6, -2.8, // 460
        121.3, 27.9, -2.6, // 470
        121.3, 24.3, -2.6, // 480
        113.5, 20.1, -1.8, // 490
        113.1, 16.2, -1.5, // 500
        110.8, 13.2, -1.3, // 510
        106.5, 8.6, -1.2, // 520
        108.8, 6.1, -1.0, // 530
        105.3, 4.2, -0.5, // 540
        104.4, 1.9, -0.3, // 550
        100.0, 0.0, 0.0, // 560
        96.0, -1.6, 0.2, // 570
        95.1, -3.5, 0.5, // 580
        89.1, -3.5, 2.1, // 590
        90.5, -5.8, 3.2, // 600
        90.3, -7.2, 4.1, // 610
        88.4, -8.6, 4.7, // 620
        84.0, -9.5, 5.1, // 630
        85.1, -10.9, 6.7, // 640
        81.9, -10.7, 7.3, // 650
        82.6, -12.0, 8.6, // 660
        84.9, -14.0, 9.8, // 670
        81.3, -13.6, 10.2, // 680
        71.9, -12.0, 8.3, // 690
        74.3, -13.3, 9.6, // 700
        76.4, -12.9, 8.5, // 710
        63.3, -10.6, 7.0, // 720
        71.7, -11.6, 7.6, // 730
        77.0, -12.2, 8.0, // 740
        65.2, -10.2, 6.7, // 750
        47.7, -7.8, 5.2, // 760
        68.6, -11.2, 7.4, // 770
        65.0, -10.4, 6.8, // 780
        66.0, -10.6, 7.0, // 790
        61.0, -9.7, 6.4, // 800
        53.3, -8.3, 5.5, // 810
        58.9, -9.3, 6.1, // 820
        61.9, -9.8, 6.5, // 830
    ];
}
