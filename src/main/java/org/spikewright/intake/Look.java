package org.spikewright.intake;

import java.util.List;

/**
 * What one look at the watched folder found. Files are ordered by name, notices by key.
 *
 * @param ready files that held still and open; told at each look until they are moved, change, or
 *     are marked as handled
 * @param settling files that may still be written
 * @param waiting files that held still but do not open, with the reason
 * @param notices what began or ended with this look
 */
public record Look(
    List<Sighting> ready,
    List<FileState.Seen> settling,
    List<FileState.Waiting> waiting,
    List<Notice> notices) {}
