// Opens the database of a folder and keeps it until it is killed.
import { openDatabase } from "@/lib/data/open-database";

await openDatabase(process.argv[2]!);
process.stdout.write("open\n");
setInterval(() => undefined, 1000);
