package org.spikewright.config;

import java.util.Optional;

/**
 * The configuration's text with that of {@code controls.toml} behind it, so that both are recorded,
 * and read again, as one.
 *
 * @param settings of the configuration's own file
 * @param controls of the other file, where there is one
 * @param whole both
 */
record ControlsText(TomlText settings, Optional<TomlText> controls, TomlText whole) {
  /** The file of controls, beside the configuration. */
  static final String NAME = "controls.toml";

  private static final String DIVIDER = "\n#==== " + NAME + " ====\n";

  /** Both files as they were read. */
  static ControlsText join(TomlText settings, Optional<TomlText> controls) {
    TomlText whole =
        controls.map(own -> TomlText.of(settings.text() + DIVIDER + own.text())).orElse(settings);
    return new ControlsText(settings, controls, whole);
  }

  /** The two parts of a text that was recorded. */
  static ControlsText part(String whole) {
    int at = whole.indexOf(DIVIDER);
    return at < 0
        ? new ControlsText(TomlText.of(whole), Optional.empty(), TomlText.of(whole))
        : new ControlsText(
            TomlText.of(whole.substring(0, at)),
            Optional.of(TomlText.of(whole.substring(at + DIVIDER.length()))),
            TomlText.of(whole));
  }
}
