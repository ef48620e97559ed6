package org.spikewright.decode;

import java.nio.file.Path;
import org.spikewright.table.TableShape;

/** Reads a file in a machine of its own and says how many rows and cells it has. */
final class LargeSheet {
  private LargeSheet() {}

  public static void main(String[] args) {
    long[] counts = new long[2];
    FileDecoder.read(
            Path.of(args[0]),
            "large",
            TableShape.plain(),
            row -> {
              counts[0]++;
              counts[1] += row.cells().size();
              return true;
            })
        .ifPresent(fault -> System.out.println(fault));
    System.out.println(counts[0] + " rows, " + counts[1] + " cells");
  }
}
