// Hotfront searches the design space of a Stirling engine for its Pareto front; see README.md.
package main

import "os"

func main() {
	os.Exit(execute(os.Args[1:], os.Stdin, os.Stdout, os.Stderr))
}
