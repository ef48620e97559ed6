package org.spikewright.decode;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.EnumSource;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.table.Row;
import org.spikewright.table.TableShape;

class FileDecoderTest {
  @TempDir Path folder;

  /** One file of each kind, of the same three rows, under a name that says another kind. */
  enum Kind {
    TEXT("run.xlsx"),
    XLSX("run.xls"),
    XLS("run.csv");

    final String misleadingName;

    Kind(String misleadingName) {
      this.misleadingName = misleadingName;
    }

    byte[] bytes() {
      return switch (this) {
        case TEXT -> "S1\nS2\nS3\n".getBytes(StandardCharsets.UTF_8);
        case XLSX ->
            HandMadeXlsx.ofRows(
                    "<row><c t='str'><v>S1</v></c></row><row><c t='str'><v>S2</v></c></row>"
                        + "<row><c t='str'><v>S3</v></c></row>")
                .bytes();
        case XLS ->
            PoiXls.book(
                book -> {
                  for (int i = 0; i < 3; i++) {
                    PoiXls.sheet(book, "Data")
                        .createRow(i)
                        .createCell(0)
                        .setCellValue("S" + (i + 1));
                  }
                });
      };
    }
  }

  @ParameterizedTest
  @EnumSource(Kind.class)
  void a_wrong_extension_does_not_matter(Kind kind) throws IOException {
    Path file = Files.write(folder.resolve(kind.misleadingName), kind.bytes());
    Decoded decoded = Decoded.of(file);
    assertThat(decoded.faultText()).isEqualTo("no fault");
    assertThat(decoded.shown()).containsExactly("1: S1", "2: S2", "3: S3");
  }

  @ParameterizedTest
  @EnumSource(Kind.class)
  void a_sink_that_wants_no_more_ends_the_reading_without_a_fault(Kind kind) throws IOException {
    Path file = Files.write(folder.resolve("run"), kind.bytes());
    List<Row> taken = new ArrayList<>();
    var fault =
        FileDecoder.read(
            file,
            "run",
            TableShape.plain(),
            row -> {
              taken.add(row);
              return taken.size() < 2;
            });
    assertThat(fault).isEmpty();
    assertThat(taken).hasSize(2);
  }

  @ParameterizedTest
  @EnumSource(Kind.class)
  void what_the_sink_throws_comes_out_as_it_is(Kind kind) throws IOException {
    Path file = Files.write(folder.resolve("run"), kind.bytes());
    List<Throwable> thrown =
        List.of(
            new IllegalStateException("ledger"),
            new UncheckedIOException(new IOException("ledger")),
            new NullPointerException(),
            new StackOverflowError(),
            new OutOfMemoryError("pretended"));
    for (Throwable original : thrown) {
      assertThatThrownBy(
              () -> FileDecoder.read(file, "run", TableShape.plain(), row -> fail(original)))
          .isSameAs(original);
    }
  }

  private static boolean fail(Throwable throwable) {
    if (throwable instanceof Error error) {
      throw error;
    }
    throw (RuntimeException) throwable;
  }

  @Test
  void a_file_that_is_gone_is_no_fault_of_its_content() {
    Path gone = folder.resolve("gone.csv");
    assertThatThrownBy(() -> Decoded.of(gone)).isInstanceOf(UncheckedIOException.class);
    assertThatThrownBy(() -> Decoded.of(folder)).isInstanceOf(UncheckedIOException.class);
  }

  @ParameterizedTest
  @MethodSource
  void what_holds_no_table_is_named(String named, byte[] content) {
    Decoded decoded = Decoded.of(folder, content, TableShape.plain());
    assertThat(decoded.faultText()).startsWith("the file | ").contains(named);
    assertThat(decoded.rows()).isEmpty();
  }

  static Stream<Arguments> what_holds_no_table_is_named() {
    return Stream.of(
        Arguments.of("empty", new byte[0]),
        Arguments.of("PDF", latin1("%PDF-1.7\n")),
        Arguments.of("gzip", latin1("\u001f\u008b\u0008\u0000")),
        Arguments.of("RTF", latin1("{\\rtf1 text}")),
        Arguments.of("picture", latin1("\u0089PNG\r\n")),
        Arguments.of("web page", latin1("<HTML><body><table>")),
        Arguments.of("web page", latin1("\u00ef\u00bb\u00bf\r\n<!DOCTYPE html>")),
        Arguments.of("XML document", latin1("<?xml version='1.0'?><Workbook/>")),
        Arguments.of("XML document", "\ufeff<?xml ?>".getBytes(StandardCharsets.UTF_16LE)),
        Arguments.of("without a workbook", zip("readme.txt", "text")),
        Arguments.of("without a workbook", HandMadeXlsx.zip(Map.of(), false)),
        Arguments.of(
            "OpenDocument", zip("mimetype", "application/vnd.oasis.opendocument.spreadsheet")),
        Arguments.of("XLSB", zip("_rels/.rels", link("xl/workbook.bin"))),
        Arguments.of("DOCX", zip("_rels/.rels", link("word/document.xml"))),
        Arguments.of("PPTX", zip("_rels/.rels", link("/ppt/presentation.xml"))),
        Arguments.of("DOC", PoiXls.compound("WordDocument")),
        Arguments.of("without a workbook", PoiXls.compound("Contents")),
        Arguments.of("password", PoiXls.compound("EncryptedPackage")));
  }

  @ParameterizedTest
  @EnumSource(Kind.class)
  void a_file_cut_short_is_read_whole_or_named_and_never_an_exception(Kind kind) {
    byte[] whole = kind.bytes();
    List<String> rows = List.of("1: S1", "2: S2", "3: S3");
    for (int part = 1; part < 20; part++) {
      byte[] cut = Arrays.copyOf(whole, Math.max(1, whole.length * part / 20));
      Decoded decoded = Decoded.of(folder, cut, TableShape.plain());
      switch (kind) {
        case TEXT ->
            assertThat(String.join("", decoded.shown()))
                .isNotEmpty()
                .isSubstringOf(String.join("", rows));
        case XLSX -> {
          assertThat(decoded.faultText()).contains("breaks off");
          assertThat(decoded.rows()).isEmpty();
        }
        // The last blocks of a compound document may be padding.
        case XLS ->
            assertThat(decoded.fault().isPresent() || decoded.shown().equals(rows))
                .as("cut at %d of 20: %s", part, decoded.shown())
                .isTrue();
      }
    }
  }

  private static byte[] latin1(String text) {
    return text.getBytes(StandardCharsets.ISO_8859_1);
  }

  private static byte[] zip(String name, String content) {
    Map<String, byte[]> parts = new LinkedHashMap<>();
    parts.put(name, latin1(content));
    return HandMadeXlsx.zip(parts, true);
  }

  private static String link(String target) {
    return "<Relationships><Relationship Id='a' Type='x/officeDocument' Target='"
        + target
        + "'/></Relationships>";
  }
}
