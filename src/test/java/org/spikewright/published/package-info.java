/**
 * Published examples through the public path: an export and a mapping in, a judged result out.
 * Start at {@link org.spikewright.published.PublishedCase}; the files lie under {@code
 * src/test/resources/published}.
 */
package org.spikewright.published;
