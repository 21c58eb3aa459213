import { decodePDFRawStream, PDFArray, PDFDict, PDFDocument, PDFHexString, PDFName, PDFRawStream, PDFString } from 'pdf-lib';
import { canonicalJson } from '@/services/engine/record/canonical';
import { certificateRecord } from '../pdf/certificate-record';
import type { CertificateRecord } from '../pdf/certificate-record';
import { sealFieldName } from './reserve-seal';

/** Largest attached record that is unpacked, in bytes. */
const mostRecordBytes = 16 * 1024 * 1024;

/**
 * Reads the record and the seal's time out of a document whose signature has been verified: only then is it ours to parse.
 * 'unexpected-content': not exactly one seal field, or not exactly one attachment. 'record-wrong': it is no canonical record.
 */
export async function readSealedDocument(
  bytes: Uint8Array,
): Promise<{ record: CertificateRecord; signedAt: Date } | 'unexpected-content' | 'record-wrong'> {
  try {
    const document = await PDFDocument.load(bytes, { updateMetadata: false, throwOnInvalidObject: true });
    const signedAt = sealTime(document.catalog);
    const attached = attachedFile(document.catalog);
    if (signedAt === undefined || attached === undefined) return 'unexpected-content';
    const text = new TextDecoder('utf-8', { fatal: true }).decode(attached.bytes);
    const parsed = certificateRecord.safeParse(JSON.parse(text));
    if (!parsed.success || canonicalJson(parsed.data) !== text) return 'record-wrong';
    return attached.name === `${parsed.data.number}.json` ? { record: parsed.data, signedAt } : 'record-wrong';
  } catch {
    return 'record-wrong';
  }
}

function sealTime(catalog: PDFDict): Date | undefined {
  const fields = catalog.lookup(PDFName.of('AcroForm'), PDFDict).lookup(PDFName.of('Fields'), PDFArray);
  if (fields.size() !== 1) return undefined;
  const field = fields.lookup(0, PDFDict);
  if (field.lookup(PDFName.of('T'), PDFHexString).decodeText() !== sealFieldName) return undefined;
  const seal = field.lookup(PDFName.of('V'), PDFDict);
  return seal.lookup(PDFName.of('M'), PDFString).decodeDate();
}

function attachedFile(catalog: PDFDict): { name: string; bytes: Uint8Array } | undefined {
  const names = catalog.lookup(PDFName.of('Names'), PDFDict).lookup(PDFName.of('EmbeddedFiles'), PDFDict);
  const entries = names.lookup(PDFName.of('Names'), PDFArray);
  if (entries.size() !== 2) return undefined;
  const specification = entries.lookup(1, PDFDict);
  const name = specification.lookup(PDFName.of('UF'), PDFHexString).decodeText();
  const stream = specification.lookup(PDFName.of('EF'), PDFDict).lookup(PDFName.of('F'));
  if (!(stream instanceof PDFRawStream) || stream.contents.length > mostRecordBytes) return undefined;
  return { name, bytes: decodePDFRawStream(stream).decode() };
}
