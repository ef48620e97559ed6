package org.spikewright.decode;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.net.URISyntaxException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.table.Row;

/** The published pairs of CSV and JSON; where they come from stands beside them. */
class CsvSpectrumTest {
  /** Contradicts itself: another telephone number in the CSV than in the JSON. */
  private static final String CONTRADICTION = "location_coordinates";

  private static final Pattern OBJECT =
      Pattern.compile("\\{\\s*((?:\"(?:[^\"\\\\]|\\\\.)*\"|[^}])*)}");
  private static final Pattern MEMBER =
      Pattern.compile("\"((?:[^\"\\\\]|\\\\.)*)\"\\s*:\\s*\"((?:[^\"\\\\]|\\\\.)*)\"");

  private static Path folder() {
    try {
      return Path.of(CsvSpectrumTest.class.getResource("/decode/csv-spectrum").toURI());
    } catch (URISyntaxException e) {
      throw new IllegalStateException(e);
    }
  }

  private static List<Map<String, String>> truth(String name) throws IOException {
    List<Map<String, String>> objects = new ArrayList<>();
    Matcher object = OBJECT.matcher(Files.readString(folder().resolve(name + ".json")));
    while (object.find()) {
      Map<String, String> members = new LinkedHashMap<>();
      Matcher member = MEMBER.matcher(object.group(1));
      while (member.find()) {
        members.put(unescaped(member.group(1)), unescaped(member.group(2)));
      }
      objects.add(members);
    }
    return objects;
  }

  private static String unescaped(String json) {
    return json.replace("\\n", "\n").replace("\\r", "\r").replace("\\\"", "\"");
  }

  private static List<Map<String, String>> read(String name) {
    Decoded decoded = Decoded.of(folder().resolve(name + ".csv"));
    assertThat(decoded.faultText()).isEqualTo("no fault");
    Row header = decoded.rows().get(0);
    List<Map<String, String>> objects = new ArrayList<>();
    for (Row row : decoded.rows().subList(1, decoded.rows().size())) {
      assertThat(row.cells()).hasSameSizeAs(header.cells());
      Map<String, String> members = new LinkedHashMap<>();
      for (int i = 0; i < row.cells().size(); i++) {
        members.put(header.cell(i).shown(), row.cell(i).shown());
      }
      objects.add(members);
    }
    return objects;
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "comma_in_quotes",
        "empty",
        "empty_crlf",
        "escaped_quotes",
        "json",
        "newlines",
        "newlines_crlf",
        "quotes_and_newlines",
        "simple",
        "simple_crlf",
        "utf8"
      })
  void the_csv_reads_as_its_json_says(String name) throws IOException {
    assertThat(truth(name)).isNotEmpty();
    assertThat(read(name)).isEqualTo(truth(name));
  }

  @Test
  void the_pair_that_contradicts_itself_agrees_in_all_else() throws IOException {
    Map<String, String> truth = truth(CONTRADICTION).get(0);
    Map<String, String> read = read(CONTRADICTION).get(0);
    assertThat(read.keySet()).isEqualTo(truth.keySet());
    assertThat(truth.put("Contact Phone Number", read.get("Contact Phone Number")))
        .isNotEqualTo(read.get("Contact Phone Number"));
    assertThat(read).isEqualTo(truth);
  }

  @Test
  void none_is_left_out() throws IOException {
    try (Stream<Path> files = Files.list(folder())) {
      assertThat(files.filter(file -> file.toString().endsWith(".csv"))).hasSize(12);
    }
  }
}
