package org.spikewright.decode;

import static org.assertj.core.api.Assertions.assertThat;

import java.net.URISyntaxException;
import java.nio.file.Path;
import java.time.LocalDateTime;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.table.Cell;
import org.spikewright.table.Row;

/**
 * One table as text and as workbooks. These were written by xlsxwriter 3.0.2 (dates from 1900, a
 * text of several runs), by openpyxl 3.0.9 (dates from 1904), and by LibreOffice 7.4, which saved
 * the first of them anew.
 */
class SameTableTest {
  private static Path resource(String name) {
    try {
      return Path.of(SameTableTest.class.getResource("/decode/" + name).toURI());
    } catch (URISyntaxException e) {
      throw new IllegalStateException(e);
    }
  }

  private static List<Row> truth() {
    Decoded decoded = Decoded.of(resource("same.csv"));
    assertThat(decoded.faultText()).isEqualTo("no fault");
    assertThat(decoded.rows()).hasSize(7);
    return decoded.rows();
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "same-xlsxwriter.xlsx",
        "same-openpyxl.xlsx",
        "same-libreoffice.xlsx",
        "same-libreoffice.xls"
      })
  void a_workbook_of_another_program_reads_as_the_text_does(String name) {
    assertSame(Decoded.of(resource(name), Decoded.sheets("Data")));
  }

  private static void assertSame(Decoded decoded) {
    assertThat(decoded.faultText()).isEqualTo("no fault");
    List<Row> truth = truth();
    assertThat(decoded.rows()).hasSameSizeAs(truth);
    for (int i = 0; i < truth.size(); i++) {
      Row row = decoded.rows().get(i);
      assertThat(row.source().sheet()).isEqualTo(Optional.of("Data"));
      // The text before the last row takes two lines, but one row of a sheet.
      assertThat(row.number()).isEqualTo(truth.get(i).number() - (i == 6 ? 1 : 0));
      for (int column = 0; column < 5; column++) {
        assertCell(row.cell(column), truth.get(i).cell(column).shown(), i > 0, column);
      }
    }
  }

  private static void assertCell(Cell cell, String text, boolean data, int column) {
    if (text.isEmpty()) {
      assertThat(cell).isEqualTo(Cell.BLANK);
    } else if (data && column == 4) {
      assertThat(cell).isInstanceOf(Cell.Moment.class);
      assertThat(((Cell.Moment) cell).value()).isEqualTo(LocalDateTime.parse(text));
    } else if (data && column > 1 && NumberCells.isPlainDecimal(text)) {
      assertThat(cell).isInstanceOf(Cell.Number.class);
      assertThat(((Cell.Number) cell).value()).isEqualTo(Double.parseDouble(text));
    } else {
      assertThat(cell).isEqualTo(new Cell.Text(text));
    }
  }
}
