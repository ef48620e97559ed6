package org.spikewright.decode;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class CsvRecordsTest {
  private static final String BROKEN = "broken";

  @TempDir Path folder;

  /** Every record with its line, as the library parses the whole text. */
  private static List<String> parsed(String text) throws IOException {
    List<String> records = new ArrayList<>();
    CSVFormat format = CSVFormat.DEFAULT.builder().setIgnoreEmptyLines(false).get();
    try (CSVParser parser = CSVParser.parse(text, format)) {
      long line = 1;
      for (var walk = parser.iterator(); walk.hasNext(); ) {
        CSVRecord record = walk.next();
        records.add(line + " " + record.toList());
        line = parser.getCurrentLineNumber() + 1;
      }
    } catch (UncheckedIOException openOrFollowedQuote) {
      records.add(BROKEN);
    }
    return records;
  }

  private List<String> read(String text) throws IOException {
    Path file = folder.resolve("a.csv");
    Files.writeString(file, text);
    List<String> found = new ArrayList<>();
    TextFile source = TextFile.of(file, Optional.of(StandardCharsets.UTF_8));
    try (CsvRecords records = new CsvRecords(source, ',', '"')) {
      while (records.next()) {
        found.add(records.line() + " " + List.of(records.record()));
      }
    } catch (Unreadable quote) {
      found.add(BROKEN);
    }
    return found;
  }

  @Test
  void recordsAndTheirLinesAreThoseThatAParserFindsWhereverTheFirstQuotationMarkStands()
      throws IOException {
    long seed = 20250115;
    Random random = new Random(seed);
    for (int round = 0; round < 2000; round++) {
      String letters = round % 2 == 0 ? "ab,,\n\r" : "ab,,\n\r\"\"";
      StringBuilder text = new StringBuilder();
      for (int i = random.nextInt(24); i > 0; i--) {
        text.append(letters.charAt(random.nextInt(letters.length())));
      }
      assertThat(read(text.toString()))
          .as("seed %d, round %d: %s", seed, round, text)
          .isEqualTo(parsed(text.toString()));
    }
  }

  @Test
  void aRecordLongerThanWhatIsReadAtOnceStaysWhole() throws IOException {
    String long1 = "x".repeat(50_000);
    String text = "a,b\r\n" + long1 + ",c\r\n\r\nd,\"e\nf\"\r\ng," + long1;
    assertThat(read(text))
        .containsExactly(
            "1 [a, b]", "2 [" + long1 + ", c]", "3 []", "4 [d, e\nf]", "6 [g, " + long1 + "]");
  }

  @Test
  void aLineEndOfTwoCharactersIsOneAlsoWhereReadingStopsBetweenThem() throws IOException {
    for (int length = 16_380; length < 16_388; length++) {
      String field = "y".repeat(length);
      assertThat(read(field + "\r\nz")).containsExactly("1 [" + field + "]", "2 [z]");
    }
  }
}
