package org.spikewright.ledger;

import java.time.Instant;
import java.time.LocalDate;
import java.util.Optional;
import org.spikewright.mapping.Tally;

/**
 * A delivery as recorded.
 *
 * @param number deliveries are numbered in the order in which they were recorded
 * @param name relative to the watched folder
 * @param sha256 of its bytes, in hexadecimal
 * @param mappingSha256 of the text of the mapping that read it; empty when none applied
 * @param arrivedAt when it was read
 * @param labDay the lab day of its arrival
 * @param outcome what became of it
 * @param tally its rows; all 0 unless it was read
 * @param repeated readings that were known already
 * @param reason why it was refused, or what is to be noted; empty when nothing is
 * @param archiveName where it is to lie, as decided when it was recorded
 * @param filedAs where it lies; empty until it was moved
 */
public record Arrived(
    long number,
    String name,
    String sha256,
    String mappingSha256,
    Instant arrivedAt,
    LocalDate labDay,
    Result outcome,
    Tally tally,
    long repeated,
    String reason,
    String archiveName,
    Optional<String> filedAs) {

  /** What became of a delivery. */
  public enum Result {
    /** Its readings are in the ledger. */
    READ("read"),
    /** Nothing of it counts. */
    REFUSED("refused"),
    /** The same content had been read before. */
    KNOWN("known");

    private final String word;

    Result(String word) {
      this.word = word;
    }

    /** The word shown to people and stored. */
    public String word() {
      return word;
    }

    static Result of(String word) {
      for (Result result : values()) {
        if (result.word.equals(word)) {
          return result;
        }
      }
      throw new IllegalStateException("no outcome '" + word + "'");
    }
  }
}
