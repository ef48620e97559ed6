package org.spikewright.decode;

import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.io.InputStream;
import java.util.HashSet;
import java.util.Set;
import javax.xml.stream.XMLInputFactory;
import javax.xml.stream.XMLStreamConstants;
import javax.xml.stream.XMLStreamException;
import javax.xml.stream.XMLStreamReader;

/**
 * XML of a workbook, mark by mark, in bounded memory: without document types and entities, and with
 * a bound on what may lie between two marks and on how deep elements nest.
 */
final class PullXml implements AutoCloseable {
  private final Metered bytes;
  private final XMLStreamReader xml;

  /** Every name met: the parser keeps all of them, so that their number is bounded. */
  private final Set<String> names = new HashSet<>();

  private int depth;

  PullXml(InputStream in) throws XMLStreamException {
    XMLInputFactory factory = XMLInputFactory.newDefaultFactory();
    factory.setProperty(XMLInputFactory.SUPPORT_DTD, false);
    factory.setProperty(XMLInputFactory.IS_SUPPORTING_EXTERNAL_ENTITIES, false);
    factory.setXMLResolver(
        (publicId, systemId, base, namespace) -> new ByteArrayInputStream(new byte[0]));
    this.bytes = new Metered(in);
    this.xml = factory.createXMLStreamReader(bytes);
  }

  boolean hasNext() throws XMLStreamException {
    return xml.hasNext();
  }

  /** The next event; one of {@link XMLStreamConstants}. */
  int next() throws XMLStreamException {
    bytes.sinceMark = 0;
    int event = xml.next();
    if (event == XMLStreamConstants.START_ELEMENT) {
      depth++;
      if (depth > Limits.XML_DEPTH) {
        throw hostile("elements nested more than " + Limits.XML_DEPTH + " deep");
      }
      noteNames();
    } else if (event == XMLStreamConstants.END_ELEMENT) {
      depth--;
    } else if (event == XMLStreamConstants.PROCESSING_INSTRUCTION) {
      note("?" + xml.getPITarget());
    } else if (event == XMLStreamConstants.DTD || event == XMLStreamConstants.ENTITY_REFERENCE) {
      throw hostile("a document type or an entity");
    }
    return event;
  }

  private void noteNames() {
    note(xml.getLocalName());
    for (int i = xml.getAttributeCount() - 1; i >= 0; i--) {
      note(xml.getAttributeLocalName(i));
    }
    for (int i = xml.getNamespaceCount() - 1; i >= 0; i--) {
      note("xmlns:" + xml.getNamespacePrefix(i));
    }
  }

  private void note(String name) {
    if (names.add(name) && names.size() > Limits.XML_NAMES) {
      throw hostile("more than " + Limits.XML_NAMES + " different names of elements");
    }
  }

  /** Moves on to the start of the next element; false at the end. */
  boolean nextElement() throws XMLStreamException {
    while (xml.hasNext()) {
      if (next() == XMLStreamConstants.START_ELEMENT) {
        return true;
      }
    }
    return false;
  }

  /** How many elements are open, the one just started among them. */
  int depth() {
    return depth;
  }

  /** The element's name without its prefix. */
  String name() {
    return xml.getLocalName();
  }

  /** An attribute by its name without prefix; empty when there is none. */
  String attribute(String name) {
    String value = xml.getAttributeValue(null, name);
    return value == null ? "" : value;
  }

  /** Adds the characters of a text event. */
  void appendTo(StringBuilder text) {
    if (text.length() + xml.getTextLength() > Limits.FIELD_CHARS) {
      throw hostile("a text of more than " + Limits.FIELD_CHARS + " characters");
    }
    text.append(xml.getTextCharacters(), xml.getTextStart(), xml.getTextLength());
  }

  @Override
  public void close() throws XMLStreamException, IOException {
    xml.close();
    bytes.close();
  }

  private static Unreadable hostile(String found) {
    return new Unreadable(
        "the file",
        found + " inside the workbook",
        "a workbook as a spreadsheet program writes it",
        "open the file in a spreadsheet program and save the table as a new XLSX file");
  }

  /** Counts the bytes that the parser takes for one event. */
  private static final class Metered extends InputStream {
    private final InputStream in;
    private long sinceMark;

    Metered(InputStream in) {
      this.in = in;
    }

    @Override
    public int read() throws IOException {
      byte[] one = new byte[1];
      return read(one, 0, 1) < 0 ? -1 : one[0] & 0xFF;
    }

    @Override
    public int read(byte[] to, int from, int length) throws IOException {
      int count = in.read(to, from, length);
      sinceMark += Math.max(count, 0);
      if (sinceMark > Limits.XML_STEP_BYTES) {
        throw hostile("a name or text of more than " + Limits.XML_STEP_BYTES + " bytes");
      }
      return count;
    }

    @Override
    public void close() throws IOException {
      in.close();
    }
  }
}
