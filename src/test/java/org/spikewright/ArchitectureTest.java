package org.spikewright;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.classes;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.dependencies.SlicesRuleDefinition.slices;
import static org.assertj.core.api.Assertions.assertThat;

import com.tngtech.archunit.base.DescribedPredicate;
import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import com.tngtech.archunit.core.importer.ImportOption;
import com.tngtech.archunit.lang.ArchRule;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.PackageTable.Core;
import org.spikewright.PackageTable.Row;
import org.spikewright.offence.CoreOffence;
import org.spikewright.offence.DefaultsOffence;

/** The layout of the house, and that each rule about it can fire. */
class ArchitectureTest {
  private static final JavaClasses OURS =
      new ClassFileImporter()
          .withImportOption(new ImportOption.DoNotIncludeTests())
          .importPackages("org.spikewright");

  private static final JavaClasses OFFENCES =
      new ClassFileImporter().importPackages("org.spikewright.offence");

  private static ArchRule imports(Map<String, Row> rows) {
    return classes()
        .should(PackageTable.importOnlyWhatTheirRowLists(rows))
        .because("the data flow is the layout: what a package may know is decided in one table");
  }

  private static ArchRule noCycles(String pattern) {
    return slices()
        .matching(pattern)
        .should()
        .beFreeOfCycles()
        .because("packages in a cycle can only be understood and changed together");
  }

  private static ArchRule noTime() {
    return outsideTheWiring(BannedCalls.TIME)
        .because(
            "a summary made again must be the same: the moment and the zone come from outside");
  }

  private static ArchRule noLocale() {
    return outsideTheWiring(BannedCalls.LOCALE)
        .because("a decimal comma on one machine must not change a number on another");
  }

  private static ArchRule noCharset() {
    return outsideTheWiring(BannedCalls.CHARSET)
        .because("a µ in an export must be read alike on every machine");
  }

  private static ArchRule noChance(DescribedPredicate<JavaClass> core) {
    return noClasses()
        .that(core)
        .should(BannedCalls.makeOneOf(BannedCalls.CHANCE))
        .because("the core gives the same answer to the same readings, always");
  }

  private static ArchRule outsideTheWiring(List<BannedCalls.Call> banned) {
    return noClasses()
        .that()
        .resideOutsideOfPackage("org.spikewright.app..")
        .should(BannedCalls.makeOneOf(banned));
  }

  private static final DescribedPredicate<JavaClass> IN_CORE =
      DescribedPredicate.describe(
          "are functional core",
          type ->
              PackageTable.ROWS.entrySet().stream()
                  .filter(row -> row.getValue() instanceof Core)
                  .anyMatch(row -> type.getPackageName().equals(PackageTable.ROOT + row.getKey())));

  @Test
  void every_package_imports_only_what_its_row_lists() {
    assertThat(OURS).hasSizeGreaterThan(50);
    imports(PackageTable.ROWS).check(OURS);
  }

  @Test
  void packages_are_free_of_cycles() {
    noCycles("org.spikewright.(*)..").check(OURS);
  }

  @Test
  void the_table_itself_has_no_cycle_and_only_the_wiring_sees_everything() {
    Set<String> settled = new TreeSet<>();
    // Each round settles the packages whose imports are settled; a cycle would never be.
    for (int round = 0; round < PackageTable.ROWS.size(); round++) {
      PackageTable.ROWS.forEach(
          (name, row) -> {
            Set<String> open = new TreeSet<>(row.own());
            open.remove(name);
            open.removeAll(settled);
            if (open.isEmpty()) {
              settled.add(name);
            }
          });
    }
    assertThat(settled).isEqualTo(PackageTable.ROWS.keySet());
    assertThat(PackageTable.ROWS.entrySet())
        .filteredOn(row -> !row.getKey().equals("app"))
        .noneMatch(row -> row.getValue().own().contains("app"));
  }

  @Test
  void the_clock_and_the_zone_come_from_the_wiring() {
    noTime().check(OURS);
  }

  @Test
  void no_text_depends_on_the_language_of_the_machine() {
    noLocale().check(OURS);
  }

  @Test
  void no_byte_depends_on_the_encoding_of_the_machine() {
    noCharset().check(OURS);
  }

  @Test
  void the_core_leaves_nothing_to_chance() {
    noChance(IN_CORE).check(OURS);
  }

  private static final List<String> PLANTED =
      Stream.of(noTime(), noLocale(), noCharset(), noChance(DescribedPredicate.alwaysTrue()))
          .flatMap(rule -> rule.evaluate(OFFENCES).getFailureReport().getDetails().stream())
          .toList();

  static Stream<BannedCalls.Call> bannedCalls() {
    return Stream.of(BannedCalls.TIME, BannedCalls.LOCALE, BannedCalls.CHARSET, BannedCalls.CHANCE)
        .flatMap(List::stream);
  }

  @ParameterizedTest
  @MethodSource("bannedCalls")
  void the_rule_sees_a_planted_call(BannedCalls.Call call) {
    assertThat(PLANTED)
        .anyMatch(line -> line.startsWith(call + " in " + DefaultsOffence.class.getName()));
  }

  @Test
  void the_rule_sees_a_call_handed_on_as_a_method_reference() {
    assertThat(noLocale().evaluate(OFFENCES).getFailureReport().getDetails())
        .anyMatch(line -> line.contains("toUpperCase") && line.contains("handedOn"));
  }

  @Test
  void calls_with_locale_charset_or_clock_are_let_through() {
    List<String> reported =
        Stream.of(noTime(), noLocale(), noCharset())
            .flatMap(rule -> rule.evaluate(OFFENCES).getFailureReport().getDetails().stream())
            .toList();
    assertThat(reported).isNotEmpty().noneMatch(line -> line.contains("allowed"));
  }

  @ParameterizedTest
  @MethodSource("forbiddenImports")
  void the_table_sees_a_planted_import(String target) {
    Map<String, Row> rows = new HashMap<>(PackageTable.ROWS);
    rows.put("offence", new Core(Set.of("quantity"), Set.of()));
    List<String> reported = imports(rows).evaluate(OFFENCES).getFailureReport().getDetails();
    assertThat(reported)
        .anyMatch(line -> line.contains(CoreOffence.class.getName()) && line.contains(target));
    assertThat(reported).noneMatch(line -> line.contains("org.spikewright.quantity.Unit>"));
  }

  static Stream<String> forbiddenImports() {
    return Stream.of(
        "java.nio.file.Files",
        "java.lang.Thread",
        "java.time.Clock",
        "java.util.concurrent.ExecutorService",
        "java.util.logging.Logger",
        "org.slf4j.Logger",
        "org.apache.commons.math3.special.Gamma",
        "org.spikewright.fit.NoLine");
  }

  @Test
  void a_package_without_a_row_is_reported() {
    assertThat(imports(PackageTable.ROWS).evaluate(OFFENCES).getFailureReport().getDetails())
        .anyMatch(
            line ->
                line.equals(
                    CoreOffence.class.getName() + " lies in a package without a row in the table"));
  }

  @Test
  void a_planted_cycle_is_reported() {
    ArchRule rule = noCycles("org.spikewright.offence.(*)..");
    assertThat(rule.evaluate(OFFENCES).hasViolation()).isTrue();
  }
}
