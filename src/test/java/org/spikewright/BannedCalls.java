package org.spikewright;

import com.tngtech.archunit.core.domain.AccessTarget.CodeUnitAccessTarget;
import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.domain.JavaCodeUnit;
import com.tngtech.archunit.lang.ArchCondition;
import com.tngtech.archunit.lang.ConditionEvents;
import com.tngtech.archunit.lang.SimpleConditionEvent;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;
import java.util.stream.Collectors;
import java.util.stream.Stream;

/** Calls that read what only the wiring may know, as data; parameters by their simple names. */
final class BannedCalls {

  /** Whatever the parameters are. */
  private static final String ANY = "*";

  /** A call: owner, name ({@code <init>} for a constructor), simple names of the parameters. */
  record Call(String owner, String name, String parameters) {
    boolean matches(CodeUnitAccessTarget target) {
      return target.getOwner().getName().equals(owner)
          && target.getName().equals(name)
          && (parameters.equals(ANY) || parameters.equals(simpleParameters(target)));
    }

    @Override
    public String toString() {
      return owner + "." + name + "(" + parameters + ")";
    }
  }

  private static String simpleParameters(CodeUnitAccessTarget target) {
    return target.getRawParameterTypes().stream()
        .map(JavaClass::getSimpleName)
        .collect(Collectors.joining(","));
  }

  private static Call call(String owner, String name, String parameters) {
    return new Call(owner, name, parameters);
  }

  private static Stream<Call> now(String type) {
    return Stream.of(
        call("java.time." + type, "now", ""), call("java.time." + type, "now", "ZoneId"));
  }

  /** The clock and the zone of the machine. */
  static final List<Call> TIME =
      Stream.of(
              Stream.of(
                  call("java.lang.System", "currentTimeMillis", ""),
                  call("java.time.Instant", "now", ""),
                  call("java.time.ZoneId", "systemDefault", ""),
                  call("java.time.Clock", "systemUTC", ""),
                  call("java.time.Clock", "systemDefaultZone", ""),
                  call("java.time.Clock", "system", "ZoneId"),
                  call("java.util.TimeZone", "getDefault", ""),
                  call("java.util.Date", "<init>", ""),
                  call("java.util.Calendar", "getInstance", "")),
              now("LocalDate"),
              now("LocalTime"),
              now("LocalDateTime"),
              now("ZonedDateTime"),
              now("OffsetDateTime"))
          .flatMap(calls -> calls)
          .toList();

  /** The language of the machine: its decimal sign, its names of months, its letter case. */
  static final List<Call> LOCALE =
      List.of(
          call("java.util.Locale", "getDefault", ANY),
          call("java.lang.String", "format", "String,Object[]"),
          call("java.lang.String", "formatted", ANY),
          call("java.lang.String", "toLowerCase", ""),
          call("java.lang.String", "toUpperCase", ""),
          call("java.io.PrintStream", "printf", "String,Object[]"),
          call("java.io.PrintWriter", "printf", "String,Object[]"),
          call("java.util.Formatter", "<init>", ""),
          call("java.time.format.DateTimeFormatter", "ofPattern", "String"),
          call("java.time.format.DateTimeFormatterBuilder", "toFormatter", ""),
          call("java.text.DecimalFormat", "<init>", "String"),
          call("java.text.SimpleDateFormat", "<init>", "String"),
          call("java.text.NumberFormat", "getInstance", ""),
          call("java.text.Collator", "getInstance", ""));

  /** The encoding of the machine. */
  static final List<Call> CHARSET =
      List.of(
          call("java.lang.String", "getBytes", ""),
          call("java.lang.String", "<init>", "byte[]"),
          call("java.lang.String", "<init>", "byte[],int,int"),
          call("java.io.FileReader", "<init>", "String"),
          call("java.io.FileReader", "<init>", "File"),
          call("java.io.FileWriter", "<init>", "String"),
          call("java.io.FileWriter", "<init>", "File"),
          call("java.io.InputStreamReader", "<init>", "InputStream"),
          call("java.io.OutputStreamWriter", "<init>", "OutputStream"),
          call("java.io.PrintStream", "<init>", "OutputStream"),
          call("java.io.PrintWriter", "<init>", "OutputStream"),
          call("java.io.ByteArrayOutputStream", "toString", ""),
          call("java.util.Scanner", "<init>", "InputStream"),
          call("java.nio.charset.Charset", "defaultCharset", ""));

  /** Anything that makes two runs of the core differ. */
  static final List<Call> CHANCE =
      List.of(
          call("java.lang.Math", "random", ""),
          call("java.util.UUID", "randomUUID", ""),
          call("java.util.Collections", "shuffle", "List"),
          call("java.lang.System", "nanoTime", ""),
          call("java.lang.System", "getenv", ANY),
          call("java.lang.System", "getProperty", ANY));

  private BannedCalls() {}

  /** The class calls, or hands on as a method reference, one of the calls. */
  static ArchCondition<JavaClass> makeOneOf(List<Call> banned) {
    return new ArchCondition<>("call one of " + banned) {
      @Override
      public void check(JavaClass from, ConditionEvents events) {
        Set<String> seen = new TreeSet<>();
        Stream.concat(
                from.getCodeUnitCallsFromSelf().stream(),
                from.getCodeUnitReferencesFromSelf().stream())
            .forEach(
                access ->
                    banned.stream()
                        .filter(call -> call.matches(access.getTarget()))
                        .map(call -> call + " " + where(access.getOrigin(), access.getLineNumber()))
                        .forEach(seen::add));
        seen.forEach(text -> events.add(SimpleConditionEvent.satisfied(from, text)));
      }
    };
  }

  private static String where(JavaCodeUnit unit, int line) {
    return "in " + unit.getFullName() + " line " + line;
  }
}
