/**
 * Numbers that cannot be separated from their unit and uncertainty, and the table of units. Start
 * at {@link org.spikewright.quantity.Quantity}; {@link org.spikewright.quantity.Unit} holds the
 * table, {@link org.spikewright.quantity.NumberGrammar} is the only place where text becomes a
 * number.
 */
package org.spikewright.quantity;
