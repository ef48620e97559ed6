package org.spikewright.summary;

import java.util.List;
import org.spikewright.judgement.Outcome;

/**
 * A file for machines.
 *
 * <p>Fields stand as they are: a sample called {@code =1+1} stays so, because a program that reads
 * the file must find what the laboratory wrote. People open the workbook, where such text cannot
 * become a formula.
 *
 * @param header the columns' names
 * @param lines one list of as many fields a line; can be walked more than once
 */
public record CsvPlan(List<String> header, Iterable<List<String>> lines) {

  /** One line a result. */
  public static CsvPlan results(Iterable<ResultRow> results) {
    return new CsvPlan(ResultColumns.NAMES, Lazily.map(results, ResultColumns::fields));
  }

  /** One line a flask. */
  public static CsvPlan flasks(Iterable<Outcome> outcomes) {
    return new CsvPlan(FlaskColumns.NAMES, Lazily.flatMap(outcomes, FlaskColumns::lines));
  }
}
