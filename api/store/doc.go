// Package store keeps records: answers with the cases that they belong to.
//
// A record is immutable. Its id is the digest of its case, so that the same
// case has one record, the first that was put; what was acknowledged survives
// the end of the process and of the machine.
//
// [Store] is what the rest of the program sees. [SQL] keeps it on
// database/sql: its statements are in a text that SQLite and PostgreSQL both
// read, and [OpenSQLite] opens it on a file.
package store
