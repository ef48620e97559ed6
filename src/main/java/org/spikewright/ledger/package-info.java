/**
 * Records each file, reading, rejection, result version and summary durably, once, and reads them
 * back. Start at {@link org.spikewright.ledger.Ledger}, which takes deliveries and revisions; then
 * {@link org.spikewright.ledger.LedgerView}, which answers. The tables and what they mean stand in
 * {@code 0001.sql} beside this package's resources.
 *
 * <p>Only {@code SqliteFile} and the migration scripts know which database this is.
 */
package org.spikewright.ledger;
