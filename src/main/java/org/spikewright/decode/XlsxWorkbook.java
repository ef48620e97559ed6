package org.spikewright.decode;

import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import javax.xml.stream.XMLStreamException;

/**
 * What a workbook says about itself.
 *
 * @param sheets in the order in which a person sees them; charts are none
 * @param dates1904 whether day numbers count from 1904, else from 1900
 * @param styles name of the part with the cell styles
 * @param strings name of the part with the shared strings
 */
record XlsxWorkbook(
    List<Sheet> sheets, boolean dates1904, Optional<String> styles, Optional<String> strings) {

  /** A sheet: its name, the part it stands in, and whether the spreadsheet program hides it. */
  record Sheet(String name, String part, boolean hidden) {}

  private static final String ROOT_LINKS = "_rels/.rels";

  /**
   * Reads the list of sheets.
   *
   * @throws Unreadable when the archive is no workbook of this kind
   */
  static XlsxWorkbook in(ZipParts parts) throws IOException, XMLStreamException {
    String main = mainPart(parts);
    int slash = main.lastIndexOf('/') + 1;
    String linksPart = main.substring(0, slash) + "_rels/" + main.substring(slash) + ".rels";
    Map<String, Link> links = links(parts, linksPart, main.substring(0, slash));
    List<Sheet> sheets = new ArrayList<>();
    boolean dates1904 = false;
    try (PullXml xml = new PullXml(new ByteArrayInputStream(parts.whole(main)))) {
      while (xml.nextElement()) {
        if (xml.depth() == 1 && !xml.name().equals("workbook")) {
          throw FileKind.foreign("a packed document that is no workbook");
        }
        if (xml.name().equals("workbookPr")) {
          dates1904 = xml.attribute("date1904").matches("1|true");
        } else if (xml.name().equals("sheet") && xml.depth() == 3) {
          addSheet(xml, links, sheets);
        }
      }
    }
    return new XlsxWorkbook(
        List.copyOf(sheets), dates1904, target(links, "/styles"), target(links, "/sharedStrings"));
  }

  private static void addSheet(PullXml xml, Map<String, Link> links, List<Sheet> sheets) {
    Link link = links.get(xml.attribute("id"));
    if (link == null || link.type().endsWith("/worksheet")) {
      // A sheet without a link is listed all the same: asked for, it is missed.
      String part = link == null ? "sheet without a part" : link.target();
      sheets.add(new Sheet(xml.attribute("name"), part, !isVisible(xml.attribute("state"))));
    }
  }

  private static boolean isVisible(String state) {
    return state.isEmpty() || state.equals("visible");
  }

  private static Optional<String> target(Map<String, Link> links, String typeEnd) {
    return links.values().stream()
        .filter(link -> link.type().endsWith(typeEnd))
        .map(Link::target)
        .findFirst();
  }

  private static String mainPart(ZipParts parts) throws IOException, XMLStreamException {
    if (parts.has("mimetype")) {
      String type = new String(parts.whole("mimetype"), StandardCharsets.ISO_8859_1);
      throw FileKind.foreign(
          type.contains("spreadsheet")
              ? "an OpenDocument spreadsheet (ODS)"
              : "a packed document of the type " + Shown.quoted(type));
    }
    if (!parts.has(ROOT_LINKS)) {
      throw FileKind.foreign("a zip archive without a workbook in it");
    }
    String main =
        target(links(parts, ROOT_LINKS, ""), "/officeDocument")
            .orElseThrow(() -> FileKind.foreign("a zip archive without a workbook in it"));
    String lower = main.toLowerCase(Locale.ROOT);
    if (lower.endsWith(".bin")) {
      throw FileKind.foreign("a binary workbook (XLSB)");
    }
    if (lower.startsWith("word/")) {
      throw FileKind.foreign("a word processor's document (DOCX)");
    }
    if (lower.startsWith("ppt/")) {
      throw FileKind.foreign("a presentation (PPTX)");
    }
    return main;
  }

  private static Map<String, Link> links(ZipParts parts, String part, String folder)
      throws IOException, XMLStreamException {
    Map<String, Link> links = new HashMap<>();
    try (PullXml xml = new PullXml(new ByteArrayInputStream(parts.whole(part)))) {
      while (xml.nextElement()) {
        if (xml.name().equals("Relationship") && !xml.attribute("TargetMode").equals("External")) {
          String target = resolved(folder, xml.attribute("Target"));
          links.put(xml.attribute("Id"), new Link(xml.attribute("Type"), target));
        }
      }
    }
    return links;
  }

  /** The name of the part that a link of a part in a folder leads to. */
  private static String resolved(String folder, String target) {
    String path = target.replace('\\', '/');
    List<String> steps = new ArrayList<>();
    for (String step : (path.startsWith("/") ? path : folder + path).split("/")) {
      if (step.equals("..") && !steps.isEmpty()) {
        steps.remove(steps.size() - 1);
      } else if (!step.isEmpty() && !step.equals(".") && !step.equals("..")) {
        steps.add(step);
      }
    }
    return String.join("/", steps);
  }

  /** A link from one part to another. */
  private record Link(String type, String target) {}
}
