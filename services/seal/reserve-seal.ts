import { PDFHexString, PDFName, PDFString } from 'pdf-lib';
import type { PDFDocument, PDFRef } from 'pdf-lib';

/** The one signature field of a sealed document. */
export const sealFieldName = 'Plant seal';

/** Ten digits stand where a byte offset comes; sealing overwrites them without moving anything. */
export const offsetPlaceholder = 9_999_999_999;

export interface SealFacts {
  /** Who seals: the plant's name. */
  name: string;
  reason: string;
  location: string;
  /** Claimed time; overwritten by the time of sealing. */
  at: Date;
  /** Room for the signature in bytes. A time-stamp token with its chain takes several thousand. */
  roomBytes: number;
}

/**
 * Takes the object number of the seal. Call it before anything is drawn: the seal then stands near the start of the file,
 * so that even a file that was cut is known for one of ours.
 */
export function reserveSealReference(document: PDFDocument): PDFRef {
  return document.context.nextRef();
}

/**
 * Puts an empty seal into a document: a certification signature that permits no change (DocMDP level 1, ISO 32000-1, 12.8.2.2)
 * in an invisible field of the first page. `sealPdf` fills it in place, so that a sealed document has one revision only.
 */
export function reserveSeal(document: PDFDocument, reference: PDFRef, facts: SealFacts): void {
  const { context, catalog } = document;
  const seal = context.obj({
    Type: 'Sig',
    Filter: 'Adobe.PPKLite',
    SubFilter: 'ETSI.CAdES.detached',
    ByteRange: [0, offsetPlaceholder, offsetPlaceholder, offsetPlaceholder],
    Contents: PDFHexString.of('0'.repeat(facts.roomBytes * 2)),
    M: PDFString.of(pdfTime(facts.at)),
    Name: PDFHexString.fromText(facts.name),
    Reason: PDFHexString.fromText(facts.reason),
    Location: PDFHexString.fromText(facts.location),
    Reference: [
      { Type: 'SigRef', TransformMethod: 'DocMDP', TransformParams: { Type: 'TransformParams', P: 1, V: PDFName.of('1.2') } },
    ],
  });
  context.assign(reference, seal);
  const page = document.getPage(0);
  const field = context.register(
    context.obj({
      Type: 'Annot',
      Subtype: 'Widget',
      FT: 'Sig',
      T: PDFHexString.fromText(sealFieldName),
      Rect: [0, 0, 0, 0],
      // Print and locked (ISO 32000-1, 12.5.3).
      F: 132,
      P: page.ref,
      V: reference,
    }),
  );
  page.node.addAnnot(field);
  catalog.set(PDFName.of('AcroForm'), context.register(context.obj({ SigFlags: 3, Fields: [field] })));
  catalog.set(PDFName.of('Perms'), context.obj({ DocMDP: reference }));
}

/** A PDF date in UTC of fixed width, `D:20260309120000Z`. */
export function pdfTime(at: Date): string {
  return `D:${at.toISOString().slice(0, 19).replace(/[-T:]/g, '')}Z`;
}
