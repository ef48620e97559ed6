package org.spikewright.intake;

/**
 * One line of a lab day's journal: with the files beside it, all that is needed to make the ledger
 * anew.
 *
 * @param arrival number of the delivery
 * @param sha256 of its bytes, 64 hexadecimal digits
 * @param originalName as delivered, relative to the watched folder, safe to show
 * @param mappingSha256 of the mapping's text; empty when none applied
 */
public record Journalled(long arrival, String sha256, String originalName, String mappingSha256) {

  /** A CSV line; the name is always quoted. */
  String line() {
    String name = ShownName.of(originalName).replace("\"", "\"\"");
    return arrival + "," + sha256 + ",\"" + name + "\"," + mappingSha256;
  }

  /** Reads such a line; {@link IllegalArgumentException} for any other. */
  static Journalled parse(String line) {
    int first = line.indexOf(',');
    int second = line.indexOf(',', first + 1);
    int last = line.lastIndexOf(',');
    if (first < 1 || second != first + 1 + FileDigest.LENGTH || last < second + 3) {
      throw new IllegalArgumentException("expected arrival,sha256,\"name\",mapping sha256");
    }
    String quoted = line.substring(second + 1, last);
    if (quoted.charAt(0) != '"' || quoted.charAt(quoted.length() - 1) != '"') {
      throw new IllegalArgumentException("expected a name in quotes");
    }
    return new Journalled(
        Long.parseLong(line.substring(0, first)),
        line.substring(first + 1, second),
        quoted.substring(1, quoted.length() - 1).replace("\"\"", "\""),
        line.substring(last + 1));
  }
}
