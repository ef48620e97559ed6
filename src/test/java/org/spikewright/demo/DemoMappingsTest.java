package org.spikewright.demo;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;
import org.spikewright.config.Loaded;
import org.spikewright.config.MappingFolder;
import org.spikewright.config.Settings;
import org.spikewright.mapping.Mapping;

/** The demo's configuration and mappings load, and between them claim every export once. */
class DemoMappingsTest {
  private static final Path FOLDER = Path.of("watch-folder-example");

  @Test
  void the_configuration_is_in_order_and_points_into_the_example() {
    Path folder = FOLDER.toAbsolutePath();
    Settings settings = settings();
    assertThat(settings.watch()).isEqualTo(folder.resolve("inbox"));
    assertThat(settings.mappings()).isEqualTo(folder.resolve("mappings"));
    assertThat(settings.summaries()).isEqualTo(folder.resolve("summaries"));
    assertThat(settings.ledger()).isEqualTo(folder.resolve("ledger").resolve("spikewright.db"));
    assertThat(settings.laboratory()).isEqualTo("Brackwater Trace Laboratory");
  }

  @Test
  void every_mapping_is_in_order() {
    MappingFolder folder = mappings();
    assertThat(folder.faults()).isEmpty();
    assertThat(folder.good()).hasSize(4);
  }

  @Test
  void every_export_is_claimed_by_one_mapping() throws IOException {
    List<Mapping> mappings = mappings().good();
    for (String export : DemoFolder.exports().keySet()) {
      assertThat(mappings.stream().filter(mapping -> mapping.claims(export))).as(export).hasSize(1);
    }
  }

  @Test
  void the_mappings_name_the_instruments_of_the_truth_file() {
    Set<String> told =
        ReferenceTable.truth().stream()
            .map(row -> row.get("instrument"))
            .collect(Collectors.toSet());
    assertThat(mappings().good().stream().map(Mapping::instrument).collect(Collectors.toSet()))
        .isEqualTo(told);
  }

  private static MappingFolder mappings() {
    Settings settings = settings();
    return MappingFolder.load(settings.mappings(), settings.calendar().zone(), settings.shelf());
  }

  private static Settings settings() {
    Loaded<Settings> loaded = Settings.load(FOLDER.resolve("spikewright.toml"));
    assertThat(loaded).isInstanceOf(Loaded.Good.class);
    return ((Loaded.Good<Settings>) loaded).value();
  }
}
