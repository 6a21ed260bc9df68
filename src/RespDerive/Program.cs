Console.WriteLine("respderive");
