namespace ProtoLedger.Reports.Pictures;

/// <summary>Predicted pictures of one series: before, after and the difference, under one window.</summary>
/// <param name="Name">Lower-case letters, digits and hyphens; unique within a page.</param>
/// <param name="Title">What is shown.</param>
/// <param name="Text">What the pictures show, in words.</param>
/// <param name="Size">Pixels along a side.</param>
/// <param name="Before">PNG.</param>
/// <param name="After">PNG.</param>
/// <param name="Difference">PNG: middle grey is no change, white brighter after, black darker.</param>
public sealed record PictureSet(string Name, string Title, string Text, int Size, byte[] Before, byte[] After, byte[] Difference);
