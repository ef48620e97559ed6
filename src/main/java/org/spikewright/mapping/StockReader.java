package org.spikewright.mapping;

import java.util.Map;
import java.util.Optional;
import java.util.TreeSet;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Stock;
import org.spikewright.table.Cell;

/** Reads a stock: a concentration, or the name of one. */
public final class StockReader {
  private final Map<String, Stock> stocks;
  private final AmountReader amounts;

  /** Reads quantities by a notation and names by a table. */
  public StockReader(Map<String, Stock> stocks, Notation notation) {
    this.stocks = stocks;
    this.amounts = new AmountReader(notation);
  }

  /** The stock of this name, if there is one. */
  public Optional<Stock> named(String text) {
    return Optional.ofNullable(stocks.get(ToolChoice.normal(text)));
  }

  /**
   * Reads a cell.
   *
   * @param declared the unit of a bare number
   */
  public Understood<Measured> read(Cell cell, Optional<Unit> declared, String analyte) {
    return cell instanceof Cell.Text text
        ? read(text.text(), declared, analyte)
        : amounts.read(Fact.STOCK, cell, declared);
  }

  /** Reads a text. */
  public Understood<Measured> read(String text, Optional<Unit> declared, String analyte) {
    Optional<Stock> stock = named(text);
    if (stock.isPresent()) {
      return of(stock.get(), analyte);
    }
    Understood<Measured> read = amounts.read(Fact.STOCK, text, declared);
    boolean mayBeName =
        read instanceof Understood.Nothing<Measured> nothing
            && nothing.reason() == Reason.NOT_A_NUMBER
            && !text.contains("±");
    return mayBeName && !stocks.isEmpty()
        ? new Understood.Nothing<>(
            Reason.NAME_UNKNOWN,
            text.strip(),
            Fact.STOCK.expectation() + ", or " + ToolChoice.expected("stocks", text, stocks))
        : read;
  }

  private static Understood<Measured> of(Stock stock, String analyte) {
    return stock
        .of(analyte)
        .<Understood<Measured>>map(Understood.Value::new)
        .orElseGet(
            () ->
                new Understood.Nothing<>(
                    Reason.NAME_UNKNOWN,
                    stock.name() + " for " + Said.briefly(analyte),
                    "a stock that holds "
                        + Said.briefly(analyte)
                        + "; this one holds "
                        + String.join(", ", new TreeSet<>(stock.each().keySet()))));
  }
}
