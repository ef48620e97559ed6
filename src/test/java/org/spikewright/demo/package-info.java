/**
 * The invented night of the imaginary Brackwater Trace Laboratory. Start at {@link
 * org.spikewright.demo.DemoFolder}, which writes it; then {@link org.spikewright.demo.DemoNight},
 * which series it holds and what is wrong with each.
 */
package org.spikewright.demo;
