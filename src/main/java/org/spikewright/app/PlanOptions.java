package org.spikewright.app;

import java.util.List;
import java.util.Optional;
import picocli.CommandLine.Option;

/** What {@code plan} is told, as typed. */
final class PlanOptions {
  @Option(
      names = "--expected",
      required = true,
      paramLabel = "CONC",
      description = "Expected concentration in the solution to be aliquoted, such as \"12 µg/L\".")
  String expected = "";

  @Option(
      names = "--aliquot",
      paramLabel = "AMOUNT",
      description = "Aliquot in each flask, such as \"10 mL\", or \"2 g\" where it is weighed.")
  Optional<String> aliquot = Optional.empty();

  @Option(
      names = "--final",
      paramLabel = "VOLUME",
      description = "Volume each flask is made up to, such as \"50 mL\".")
  Optional<String> finalVolume = Optional.empty();

  @Option(
      names = "--start",
      paramLabel = "VOLUME",
      description = "One vessel: its volume before the first addition.")
  Optional<String> start = Optional.empty();

  @Option(
      names = "--stock",
      paramLabel = "[NAME=]CONC",
      description = "A stock at hand, such as \"10 mg/L\" or \"B=1 g/L\"; may be repeated.")
  List<String> stocks = List.of();

  @Option(
      names = "--flasks",
      paramLabel = "NUMBER",
      description = "How many flasks, 4 or more (default: the configuration's, else 4).")
  Optional<Integer> flasks = Optional.empty();

  @Option(
      names = "--pipette",
      paramLabel = "RANGE",
      description =
          "A pipette's good range, such as \"10 µL to 100 µL\"; may be repeated; replaces the"
              + " configuration's.")
  List<String> pipettes = List.of();

  @Option(
      names = "--noise",
      paramLabel = "SHARE",
      description = "Scatter of a flask, of its signal, such as \"2 %%\" (default: 2 %%).")
  Optional<String> noise = Optional.empty();

  @Option(
      names = "--target",
      paramLabel = "SHARE",
      description = "Relative uncertainty to meet, such as \"10 %%\": as many flasks as it takes.")
  Optional<String> target = Optional.empty();

  @Option(
      names = "--most-signal",
      paramLabel = "SIGNAL",
      description = "Largest signal to be trusted; needs --slope.")
  Optional<Double> mostSignal = Optional.empty();

  @Option(
      names = "--slope",
      paramLabel = "SLOPE",
      description =
          "Signal for one unit of the expected concentration in the measured solution, such as that"
              + " of a calibration.")
  Optional<Double> slope = Optional.empty();
}
