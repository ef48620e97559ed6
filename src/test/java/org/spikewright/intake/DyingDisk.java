package org.spikewright.intake;

import java.io.IOException;
import java.nio.file.AtomicMoveNotSupportedException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;

/** A disk on which the program dies before a given step, as by a kill: nothing is tidied up. */
class DyingDisk extends Disk {
  /** The program is gone; nobody may catch this. */
  static final class Died extends Error {
    private static final long serialVersionUID = 1L;
  }

  private final int fatal;
  private final boolean twoDisks;
  final List<String> steps = new ArrayList<>();

  /**
   * @param fatal the step before which it dies, from 1; 0 for never
   * @param twoDisks whether the archive is to behave as if it lay on another disk
   */
  DyingDisk(int fatal, boolean twoDisks) {
    this.fatal = fatal;
    this.twoDisks = twoDisks;
  }

  @Override
  void before(String step) {
    steps.add(step);
    if (steps.size() == fatal) {
      throw new Died();
    }
  }

  @Override
  void rename(Path from, Path to) throws IOException {
    if (twoDisks && isArchive(from) != isArchive(to)) {
      throw new AtomicMoveNotSupportedException(from.toString(), to.toString(), "two disks");
    }
    super.rename(from, to);
  }

  private static boolean isArchive(Path path) {
    return path.toString().contains("done") || path.toString().contains("rejected");
  }
}
