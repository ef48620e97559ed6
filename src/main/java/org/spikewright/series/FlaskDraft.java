package org.spikewright.series;

import java.util.List;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.Recorded;

/** A flask's readings before the series has an axis. */
record FlaskDraft(
    String label, FlaskFacts facts, List<Recorded> readings, List<Recorded> secondRun) {}
