package org.spikewright.demo;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Locale;
import java.util.Map;
import java.util.TimeZone;
import java.util.TreeMap;
import java.util.stream.Stream;
import java.util.zip.ZipEntry;
import java.util.zip.ZipInputStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class DemoFolderTest {
  @TempDir Path folder;

  @Test
  void the_committed_demo_is_what_the_generator_writes() throws IOException {
    Path truth = folder.resolve("truth.csv");
    Path inbox = folder.resolve("inbox");
    DemoFolder.main(new String[] {inbox.toString(), truth.toString()});

    assertThat(truth).hasSameBinaryContentAs(DemoFolder.TRUTH);
    assertThat(files(inbox)).isNotEmpty().isEqualTo(files(DemoFolder.INBOX));
  }

  @Test
  void zone_and_locale_of_the_machine_change_no_bit() throws IOException {
    Map<String, byte[]> here = DemoFolder.exports();
    TimeZone zone = TimeZone.getDefault();
    Locale locale = Locale.getDefault();
    try {
      TimeZone.setDefault(TimeZone.getTimeZone("Pacific/Chatham"));
      Locale.setDefault(Locale.forLanguageTag("hi-IN-u-nu-deva"));
      Map<String, byte[]> there = DemoFolder.exports();
      assertThat(there.keySet()).isEqualTo(here.keySet());
      here.forEach((name, bytes) -> assertThat(there.get(name)).as(name).isEqualTo(bytes));
    } finally {
      TimeZone.setDefault(zone);
      Locale.setDefault(locale);
    }
  }

  /** Name to content; what a run files away beside the exports does not count. */
  private static Map<String, String> files(Path inbox) throws IOException {
    Map<String, String> files = new TreeMap<>();
    try (Stream<Path> found = Files.walk(inbox)) {
      for (Path path : found.filter(Files::isRegularFile).toList()) {
        String name = inbox.relativize(path).toString().replace('\\', '/');
        if (!name.startsWith("done/") && !name.startsWith("rejected/")) {
          files.put(name, content(name, Files.readAllBytes(path)));
        }
      }
    }
    return files;
  }

  /** Bytes as text; of a workbook its parts, since zip headers may differ between Java versions. */
  private static String content(String name, byte[] bytes) throws IOException {
    if (!name.endsWith(".xlsx")) {
      return new String(bytes, StandardCharsets.ISO_8859_1);
    }
    StringBuilder parts = new StringBuilder();
    try (ZipInputStream in = new ZipInputStream(new ByteArrayInputStream(bytes))) {
      for (ZipEntry entry = in.getNextEntry(); entry != null; entry = in.getNextEntry()) {
        parts.append(entry.getName()).append('\n');
        parts.append(new String(in.readAllBytes(), StandardCharsets.UTF_8)).append('\n');
      }
    }
    return parts.toString();
  }
}
