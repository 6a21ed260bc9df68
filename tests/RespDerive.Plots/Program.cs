using RespDerive.Physiology;
using RespDerive.Plots;

// Draws the pictures of the reference pages: dotnet run --project tests/RespDerive.Plots [FOLDER]
var folder = args.Length > 0 ? args[0] : Path.Combine("docs", "reference", "plots");
Directory.CreateDirectory(folder);
Picture[] pictures = [Drawings.AlveolarArterialDifference, Drawings.Dissociation, Drawings.WorkOfBreathing];
foreach (var picture in pictures.Where(picture => picture.Needs.All(key => Catalogue.Shipped.Find(key) is not null)))
{
    await File.WriteAllTextAsync(Path.Combine(folder, picture.Definition + ".svg"), picture.Draw());
    Console.WriteLine(picture.Definition);
}
