package org.spikewright;

import com.tngtech.archunit.core.domain.Dependency;
import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.lang.ArchCondition;
import com.tngtech.archunit.lang.ConditionEvents;
import com.tngtech.archunit.lang.SimpleConditionEvent;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;

/** Which package may import what, as data: a new package needs a row. */
final class PackageTable {
  static final String ROOT = "org.spikewright.";

  /** What a package may import besides itself. */
  sealed interface Row permits Core, Shell, Everything {
    /** Packages of ours. */
    Set<String> own();
  }

  /** Functional core: values in, values out. */
  record Core(Set<String> own, Set<String> libraries) implements Row {}

  /** All of java.*, XML streams, javax.sql, SLF4J and the libraries of the row. */
  record Shell(Set<String> own, Set<String> libraries) implements Row {}

  /** The wiring; no row lists it, so that nobody imports it. */
  record Everything() implements Row {
    @Override
    public Set<String> own() {
      return ROWS.keySet();
    }
  }

  private static final Set<String> CORE =
      Set.of(
          "quantity",
          "table",
          "reading",
          "mapping",
          "series",
          "fit",
          "judgement",
          "analysis",
          "summary");

  static final Map<String, Row> ROWS = rows();

  private static Map<String, Row> rows() {
    String math = "org.apache.commons.math3.";
    String csv = "org.apache.commons.csv.";
    String poi = "org.apache.poi.";
    String schemas = "org.openxmlformats.schemas.";
    Map<String, Row> rows = new LinkedHashMap<>();
    rows.put("quantity", core(Set.of()));
    rows.put("table", core(Set.of()));
    rows.put("reading", core(Set.of("quantity", "table")));
    rows.put("mapping", core(Set.of("quantity", "table", "reading")));
    rows.put("series", core(Set.of("quantity", "table", "reading")));
    rows.put("fit", new Core(Set.of("quantity"), Set.of(math)));
    rows.put("judgement", core(Set.of("quantity", "table", "reading", "series", "fit")));
    rows.put("analysis", core(without("analysis", "summary")));
    rows.put("summary", core(without("summary")));
    rows.put("intake", new Shell(Set.of(), Set.of()));
    rows.put("decode", new Shell(Set.of("table"), Set.of(csv, poi)));
    rows.put("ledger", new Shell(CORE, Set.of("org.sqlite.", "org.postgresql.", "com.zaxxer.")));
    rows.put("workbook", new Shell(Set.of("summary"), Set.of(csv, poi, schemas)));
    rows.put("config", new Shell(CORE, Set.of("org.tomlj.")));
    rows.put("schedule", new Shell(Set.of(), Set.of("org.quartz.")));
    rows.put("app", new Everything());
    return rows;
  }

  private static Row core(Set<String> own) {
    return new Core(own, Set.of());
  }

  private static Set<String> without(String... names) {
    Set<String> rest = new TreeSet<>(CORE);
    rest.removeAll(Set.of(names));
    return Set.copyOf(rest);
  }

  private PackageTable() {}

  /** The rest of the Java library that the core may use: values, collections, text, time values. */
  private static final Set<String> CORE_JAVA_PACKAGES =
      Set.of(
          "java.lang",
          "java.lang.annotation",
          "java.lang.invoke",
          "java.lang.runtime",
          "java.math",
          "java.util",
          "java.util.function",
          "java.util.regex",
          "java.util.stream",
          "java.time",
          "java.time.chrono",
          "java.time.format",
          "java.time.temporal",
          "java.time.zone");

  /** Single classes: an encoding as a value that names it, a map that threads may share. */
  private static final Set<String> CORE_JAVA_CLASSES =
      Set.of(
          "java.text.Normalizer",
          "java.text.Normalizer$Form",
          "java.nio.charset.Charset",
          "java.util.concurrent.ConcurrentHashMap",
          "java.util.concurrent.ConcurrentMap");

  private static final Set<String> NOT_IN_CORE =
      Set.of(
          "java.lang.Thread",
          "java.lang.ThreadLocal",
          "java.lang.Process",
          "java.lang.ProcessBuilder",
          "java.lang.Runtime",
          "java.time.Clock",
          "java.util.Timer",
          "java.util.TimerTask",
          "java.util.Scanner",
          "java.util.Date",
          "java.util.Calendar",
          "java.util.TimeZone",
          "java.util.ResourceBundle",
          "java.util.ServiceLoader",
          "java.util.Random");

  /** A package imports only what its row lists. */
  static ArchCondition<JavaClass> importOnlyWhatTheirRowLists(Map<String, Row> rows) {
    return new ArchCondition<>("import only what the row of their package lists") {
      @Override
      public void check(JavaClass from, ConditionEvents events) {
        String name = ourPackage(from);
        Row row = rows.get(name);
        if (row == null || !from.getPackageName().equals(ROOT + name)) {
          String where = from.getName() + " lies in a package without a row in the table";
          events.add(SimpleConditionEvent.violated(from, where));
          return;
        }
        for (Dependency dependency : from.getDirectDependenciesFromSelf()) {
          JavaClass to = dependency.getTargetClass().getBaseComponentType();
          if (!to.isPrimitive() && !isAllowed(name, row, to)) {
            String what = name + " may not import: " + dependency.getDescription();
            events.add(SimpleConditionEvent.violated(dependency, what));
          }
        }
      }
    };
  }

  private static boolean isAllowed(String name, Row row, JavaClass to) {
    if (to.getPackageName().startsWith(ROOT)) {
      return ourPackage(to).equals(name) || row.own().contains(ourPackage(to));
    }
    String target = to.getName();
    if (row instanceof Core core) {
      return isCoreJava(to) || startsWithAny(target, core.libraries());
    }
    if (row instanceof Shell shell) {
      return startsWithAny(target, Set.of("java.", "javax.xml.stream.", "javax.sql.", "org.slf4j."))
          || startsWithAny(target, shell.libraries());
    }
    return true;
  }

  private static boolean isCoreJava(JavaClass to) {
    return CORE_JAVA_CLASSES.contains(to.getName())
        || CORE_JAVA_PACKAGES.contains(to.getPackageName()) && !NOT_IN_CORE.contains(to.getName());
  }

  private static boolean startsWithAny(String name, Set<String> prefixes) {
    return prefixes.stream().anyMatch(name::startsWith);
  }

  /** The package's first name below the root; empty for the root itself. */
  private static String ourPackage(JavaClass of) {
    String name = of.getPackageName();
    if (!name.startsWith(ROOT)) {
      return "";
    }
    String below = name.substring(ROOT.length());
    int dot = below.indexOf('.');
    return dot < 0 ? below : below.substring(0, dot);
  }
}
