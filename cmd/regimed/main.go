// Command regimed says which physics a coupled fluid-structure model needs:
// as a service over HTTP, and for files on the command line.
package main

import "os"

func main() { os.Exit(run(os.Args[1:], os.Stdin, os.Stdout, os.Stderr)) }
