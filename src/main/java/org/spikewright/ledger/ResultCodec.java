package org.spikewright.ledger;

import java.time.LocalDate;
import java.util.OptionalInt;
import org.spikewright.judgement.Verdict;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Subject;
import org.spikewright.series.SeriesKey;
import org.spikewright.summary.ResultRow;
import org.spikewright.summary.RowEvidence;

/** A result as text that gives back every double exactly. */
final class ResultCodec {
  private ResultCodec() {}

  static String encode(ResultRow row) {
    Fields.Writer out = new Fields.Writer();
    key(out, row.key());
    out.add(row.batch()).add(row.role());
    out.add(row.value()).add(row.unit()).add(row.reported());
    out.add(row.standardUncertainty()).add(row.expandedUncertainty()).add(row.coverageFactor());
    out.add(row.lower95()).add(row.upper95());
    out.add(row.ownStandardError()).add(row.ownLower95()).add(row.ownUpper95());
    out.add(row.intervalBasis()).add(row.detectionLimit());
    out.add(row.verdict().name()).add(row.flags()).add(row.sentences());
    out.add(row.flasks()).add(row.readings());
    out.add(row.slope()).add(row.signalIntercept()).add(row.residualSd());
    out.add(row.residualDf().isPresent() ? Integer.toString(row.residualDf().getAsInt()) : "");
    out.add(row.r()).add(row.design()).add(row.sourceFiles());
    evidence(out, row.evidence());
    return out.toString();
  }

  static ResultRow decode(String content) {
    Fields.Reader in = new Fields.Reader(content);
    return new ResultRow(
        key(in),
        in.text(),
        in.text(),
        in.optionalDouble(),
        in.text(),
        in.text(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.text(),
        in.optionalDouble(),
        Verdict.valueOf(in.text()),
        in.list(),
        in.list(),
        in.number(),
        in.number(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        optionalInt(in.text()),
        in.optionalDouble(),
        in.text(),
        in.list(),
        evidence(in));
  }

  private static void evidence(Fields.Writer out, RowEvidence evidence) {
    out.add(evidence.pool()).add(evidence.poolSeries());
    out.add(evidence.poolStandardError()).add(evidence.poolLower95()).add(evidence.poolUpper95());
    out.add(evidence.poolDf()).add(evidence.bendP()).add(evidence.bentValue());
    out.add(evidence.bendAllowance()).add(evidence.driftExposure()).add(evidence.effectiveDf());
    out.add(evidence.contributions());
  }

  private static RowEvidence evidence(Fields.Reader in) {
    return new RowEvidence(
        in.text(),
        in.number(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.optionalDouble(),
        in.list());
  }

  private static void key(Fields.Writer out, SeriesKey key) {
    Subject subject = key.subject();
    out.add(key.labDay().toString()).add(subject.instrument()).add(subject.sample().text());
    out.add(subject.analyte()).add(subject.line());
    out.add(key.batch()).add(key.preparation()).add(key.ordinal());
  }

  private static SeriesKey key(Fields.Reader in) {
    return new SeriesKey(
        LocalDate.parse(in.text()),
        new Subject(in.text(), new SampleId(in.text()), in.text(), in.text()),
        in.text(),
        in.text(),
        in.number());
  }

  private static OptionalInt optionalInt(String field) {
    return field.isEmpty() ? OptionalInt.empty() : OptionalInt.of(Integer.parseInt(field));
  }
}
