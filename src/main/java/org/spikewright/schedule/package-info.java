/**
 * Wakes tasks at a fixed interval. Start at {@link org.spikewright.schedule.Waker}. What is due at
 * a wake-up is never decided here: a wake-up that is late, missed or doubled does no harm.
 */
package org.spikewright.schedule;
