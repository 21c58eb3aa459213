'use client';

import { useMessages } from '@/components/theme/use-messages';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import type { MissingEntry } from './missing-entries';

type ActKind = InspectionContent['acts'][number]['kind'];

const actKinds: readonly string[] = ['processed', 'exposed', 'measured', 'evaluated', 'block-check-before', 'block-check-after'];
const roles = ['radiograph', 'photograph', 'reading-file', 'document'] as const;

function isAct(text: string | undefined): text is ActKind {
  return text !== undefined && actKinds.includes(text);
}

/** Says in a few words what is still missing. */
export function useMissingWords(): (entry: MissingEntry) => string {
  const t = useMessages('inspections');
  return ({ kind, name, act }) => {
    if (kind === 'step') return t('lacks.step', { nominal: name, act: act ? t(`act.${act}`) : '' });
    if (kind === 'act') return isAct(name) ? t(`act.${name}`) : name;
    if (kind === 'equipment') return t('equipment', { act: isAct(name) ? t(`act.${name}`) : name });
    if (kind === 'file') {
      const role = roles.find((one) => one === name);
      return role ? t(`lacks.file.${role}`) : name;
    }
    return t(`lacks.${kind}`, { name });
  };
}

/** What a field of a refusal is called on this page: `readings.3.value` is 'Reading 24'. */
export function useFieldWords(content: InspectionContent): (path: string) => string {
  const t = useMessages('inspections');
  return (path) => {
    const [list = '', second = '', third = '', ...rest] = path.split('.');
    const row = Number(second);
    if (list === 'readings') return t('reading', { number: content.readings[row]?.characteristic ?? second });
    if (list === 'attributes') return t('lacks.attribute', { name: content.attributes[row]?.number ?? second });
    if (list === 'process') return t('lacks.process', { name: content.process[row]?.number ?? second });
    if (list === 'indications') return t('indication', { id: content.indications[row]?.id ?? second });
    if (list === 'acts') {
      const kind = isAct(second) ? second : content.acts[row]?.kind;
      if (second === 'indicatorSeen' || !kind) return t('lacks.indicator', { name: '' }).trim();
      const act = t(`act.${kind}`);
      if (third === 'values' && kind.startsWith('block-check')) return t('step', { nominal: rest.join('.'), act });
      return act;
    }
    if (list === 'evidence') return t('evidence');
    if (list === 'rules') return t('inZone', { zone: third });
    if (list === 'missing' && second === 'reading') return t('reading', { number: third });
    if (list === 'missing' && (second === 'attribute' || second === 'process' || second === 'method'))
      return t(`lacks.${second}`, { name: third });
    // The rest says in its own words what it is about.
    return t('thisInspection');
  };
}
