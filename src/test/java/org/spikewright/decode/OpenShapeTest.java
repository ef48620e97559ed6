package org.spikewright.decode;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.regex.Pattern;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.table.HeaderCells;
import org.spikewright.table.Row;
import org.spikewright.table.RowSink;
import org.spikewright.table.SheetRule;
import org.spikewright.table.TableShape;
import org.spikewright.table.TableShape.EmptyRows;
import org.spikewright.table.TextForm;

/** What a mapping leaves open: separator, encoding, which sheets. */
class OpenShapeTest {
  private static final Charset WINDOWS = Charset.forName("windows-1252");

  @TempDir Path folder;

  private static TableShape sheets(SheetRule... rules) {
    return new TableShape(
        Optional.of(','),
        '"',
        Optional.empty(),
        List.of(rules),
        HeaderCells.of(List.of()),
        EmptyRows.PASSED_OVER);
  }

  private static TableShape header(HeaderCells header, EmptyRows emptyRows) {
    return new TableShape(Optional.empty(), '"', Optional.empty(), List.of(), header, emptyRows);
  }

  private Decoded book(TableShape shape) {
    byte[] content =
        PoiXls.book(
            book -> {
              for (String name : List.of("Cover", "Run 1", "Run 2", "Hidden run 3")) {
                PoiXls.sheet(book, name).createRow(0).createCell(0).setCellValue(name);
              }
              book.setSheetHidden(3, true);
              book.setSheetHidden(0, true);
            });
    return Decoded.of(folder, content, shape);
  }

  @Test
  void sheets_are_found_by_name_by_number_of_those_shown_and_by_pattern() {
    assertThat(book(sheets(new SheetRule.Named("Cover"))).shown()).containsExactly("1: Cover");
    assertThat(book(sheets(new SheetRule.Numbered(2))).shown()).containsExactly("1: Run 2");
    assertThat(book(sheets(new SheetRule.Matching(Pattern.compile(".*[Rr]un.*"), "*"))).shown())
        .containsExactly("1: Run 1", "1: Run 2");
    assertThat(book(sheets()).shown()).containsExactly("1: Run 1");
  }

  @Test
  void a_sheet_that_is_not_there_is_refused_with_those_that_are() {
    assertThat(book(sheets(new SheetRule.Numbered(3))).faultText())
        .contains("no sheet number 3", "\"Run 2\"");
    assertThat(book(sheets(new SheetRule.Matching(Pattern.compile("x"), "x"))).faultText())
        .contains("no sheet that matches \"x\"", "\"Cover\"");
  }

  @Test
  void the_separator_is_worked_out_from_a_header_of_two_rows_and_from_a_pattern() {
    HeaderCells two =
        new HeaderCells(List.of("Sample"), List.of(Pattern.compile("[A-Z][a-z] / signal")), 2);
    Decoded decoded =
        Decoded.of(
            folder,
            "a,b;c\nSample;Cd;;Pb\n;signal;sd;signal\n1;2;3;4\n".getBytes(StandardCharsets.UTF_8),
            header(two, EmptyRows.PASSED_OVER));
    assertThat(decoded.shown()).contains("4: 1|2|3|4");
    assertThat(
            Decoded.of(
                    folder,
                    "Sample;Cd,x\n;signal;sd\n1;2\n".getBytes(StandardCharsets.UTF_8),
                    header(two, EmptyRows.PASSED_OVER))
                .faultText())
        .contains("[A-Z][a-z] / signal");
  }

  @Test
  void empty_rows_are_handed_on_where_they_mean_something() {
    byte[] content = "a;b\n\n1;2\n;\n".getBytes(StandardCharsets.UTF_8);
    HeaderCells words = HeaderCells.of(List.of("a", "b"));
    assertThat(Decoded.of(folder, content, header(words, EmptyRows.PASSED_OVER)).shown())
        .containsExactly("1: a|b", "3: 1|2");
    assertThat(Decoded.of(folder, content, header(words, EmptyRows.HANDED_ON)).shown())
        .containsExactly("1: a|b", "2: ", "3: 1|2", "4: |");
  }

  private String form(byte[] content, Optional<Charset> declared) throws Exception {
    Path file = Files.write(folder.resolve("form.csv"), content);
    List<String> said = new ArrayList<>();
    RowSink sink =
        new RowSink() {
          @Override
          public boolean accept(Row row) {
            said.add(row.cell(0).shown());
            return true;
          }

          @Override
          public void begins(TextForm form) {
            said.add(form.encoding() + ", " + form.encodingSource());
          }
        };
    TableShape shape = new TableShape(Optional.of(','), '"', declared, List.of(), List.of());
    FileDecoder.read(file, "form.csv", shape, sink).ifPresent(fault -> said.add(fault.found()));
    return String.join(" | ", said);
  }

  @Test
  void utf8_goes_before_the_declared_encoding_and_the_mark_before_both() throws Exception {
    Optional<Charset> windows = Optional.of(WINDOWS);
    assertThat(form("µ".getBytes(StandardCharsets.UTF_8), windows))
        .isEqualTo("UTF-8, as its bytes are that throughout | µ");
    assertThat(form("µ".getBytes(WINDOWS), windows)).isEqualTo("windows-1252, as declared | µ");
    assertThat(form("m".getBytes(WINDOWS), windows)).isEqualTo("windows-1252, as declared | m");
    assertThat(form("\uFEFFµ".getBytes(StandardCharsets.UTF_16LE), windows))
        .isEqualTo("UTF-16LE, as the mark at its beginning says | µ");
    assertThat(form("µ".getBytes(StandardCharsets.UTF_8), Optional.empty()))
        .isEqualTo("UTF-8, as no other is declared | µ");
    assertThat(form("µ".getBytes(WINDOWS), Optional.empty()))
        .isEqualTo("UTF-8, as no other is declared | byte B5 (byte 1 of the file), no UTF-8");
    assertThat(
            form(
                "m,µ\n".getBytes(StandardCharsets.UTF_16LE),
                Optional.of(StandardCharsets.UTF_16LE)))
        .isEqualTo("UTF-16LE, as declared | m");
  }

  /** A letter cut by the end of a buffer is no fault, and a late one of another kind is seen. */
  @Test
  void utf8_is_told_over_the_whole_of_a_large_file() throws Exception {
    Optional<Charset> windows = Optional.of(WINDOWS);
    String large = "x".repeat((1 << 16) - 1) + "µ\n" + "y,µ\n".repeat(50_000);
    assertThat(form(large.getBytes(StandardCharsets.UTF_8), windows)).startsWith("UTF-8, as its");
    byte[] late = large.getBytes(StandardCharsets.UTF_8);
    late[late.length - 3] = (byte) 0xB5;
    assertThat(form(late, windows)).startsWith("windows-1252, as declared");
  }
}
