/** SQLite adapter of the ledger: verdicts, region results and curves, durable before they are answered. */
package org.laddergate.records;
