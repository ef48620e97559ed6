package org.spikewright.app;

import java.io.PrintWriter;
import java.util.ArrayList;
import java.util.List;

/** A table for a terminal: columns as wide as their widest cell. */
final class TextTable {
  private static final String GAP = "  ";

  private final List<String[]> rows = new ArrayList<>();
  private final int[] widths;

  TextTable(String... header) {
    widths = new int[header.length];
    add(header);
  }

  void add(String... cells) {
    for (int i = 0; i < widths.length; i++) {
      widths[i] = Math.max(widths[i], cells[i].length());
    }
    rows.add(cells);
  }

  void print(PrintWriter out) {
    for (String[] row : rows) {
      StringBuilder line = new StringBuilder(GAP);
      for (int i = 0; i < widths.length; i++) {
        line.append(row[i]).append(" ".repeat(widths[i] - row[i].length())).append(GAP);
      }
      out.println(line.toString().stripTrailing());
    }
  }
}
