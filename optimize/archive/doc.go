// Package archive keeps a run on disk: every design that was evaluated, with the study that asked for it,
// in one SQLite file per run folder. It implements optimize.Ledger.
//
//	DIR/archive.sqlite   what the run is and its designs
//	DIR/archive.lock     held by the search that writes, so that there is one
//
// # Tables
//
// What the run is stands in meta (key, value), as text: the study as given and as understood, seed, versions,
// names of variables and results.
//
// The designs stand in two tables, with one row for as many designs as were recorded together. Numbers are
// little-endian float64 and come back bit for bit.
//
//	batches  first   number of the row's first design; numbers begin at 0 and have no gap
//	         count   number of designs
//	         data    their numbers, see below
//	         sum     CRC-32C of first, count and data
//	results  first   as in batches; there is a row where a design of the batch has further results stored
//	         data    further results (Point.Extra), of those designs in order that have them
//	         sum     CRC-32C of first and data
//
// The data of a batch are, one part after another and without gaps:
//
//	flags    a byte a design: 1 the design failed, 2 aims and limits are all 0 and left out, 4 it has a row part in results
//	x        of every design, all variables
//	f, g     of every design without flag 2, its aims and then its limits
//	causes   where a design has flag 1: how many different causes, their lengths and texts, and for every design
//	         with flag 1 which of them, from 0; numbers here are unsigned LEB128
//
// Further results are many, so the search stores them only of designs that may be asked for by name: those on
// the front when they were found, and while none meets all limits those that come nearest. A design gives the
// others again when it is evaluated anew.
//
// # Safety
//
// What is recorded at a time is one transaction. The file is in write-ahead mode with full synchronisation:
// what Record has answered for survives a killed process and a power cut, and a batch that was cut off is not
// there at all. Write-ahead mode needs shared memory between processes, which network file systems do not
// give: a run folder belongs on a local disk. OnNetwork tells where that can be told. A damaged file is
// reported and not read as other numbers, as the sums tell.
//
// Reading a run (Read) takes no lock and may be done while a search writes.
package archive
