package org.spikewright.series;

import java.time.LocalDate;
import java.util.List;
import org.spikewright.reading.Recorded;

/**
 * Readings of one subject that belong together in time or by batch, before preparations divide
 * them.
 *
 * @param labDay the lab day of the first
 * @param batch the batch that delimits them; empty when time alone does
 * @param batchName the batch to show: the one that sorts first
 * @param alsoNamed other batch names under which the same readings came; empty mostly
 * @param readings in order of time, then replicate
 */
record Cluster(
    LocalDate labDay,
    String batch,
    String batchName,
    List<String> alsoNamed,
    List<Recorded> readings) {

  /** The same with other readings. */
  Cluster with(List<Recorded> others) {
    return new Cluster(labDay, batch, batchName, alsoNamed, others);
  }
}
