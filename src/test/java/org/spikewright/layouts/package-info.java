/**
 * One truth in every layout and kind of file, read by the shipped program's public path. Start at
 * {@link org.spikewright.layouts.LayoutMatrixTest}.
 */
package org.spikewright.layouts;
