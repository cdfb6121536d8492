Console.Error.WriteLine("Name a benchmark.");
return 2;
