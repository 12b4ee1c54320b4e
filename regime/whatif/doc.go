// Package whatif says how sure an answer is and what would change it:
// uncertainty, drivers, turning points, sweeps and maps. All of it
// asks the engine the same question many times with other inputs; nothing here
// judges.
package whatif
