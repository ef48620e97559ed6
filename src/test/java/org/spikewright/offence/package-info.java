/** Planted offences, so that each rule of the architecture is seen to fire. Never run. */
package org.spikewright.offence;
