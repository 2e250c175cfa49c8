// Package archive keeps a run on disk: every design that was evaluated, with the study that asked for it,
// in one SQLite file per run folder. It implements optimize.Ledger.
//
//	DIR/archive.sqlite   what the run is (table meta) and its designs (table designs)
//	DIR/archive.lock     held by the search that writes, so that there is one
//
// Numbers are stored as little-endian float64 and come back bit for bit; each row carries a CRC-32C of
// its content, so that a damaged file is reported and not read as other numbers.
//
// A batch of designs is one transaction. The file is in write-ahead mode with full synchronisation: what
// Record has answered for survives a killed process and a power cut, and a batch that was cut off is not
// there at all. Write-ahead mode needs shared memory between processes, which network file systems do not
// give: a run folder belongs on a local disk. OnNetwork tells where that can be told.
//
// Reading a run (Read) takes no lock and may be done while a search writes.
package archive
