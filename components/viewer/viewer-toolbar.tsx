import type { ReactNode } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { shapeTools, toolKeys, viewTools } from './tools';
import type { Tool } from './tools';
import type { Desk } from './use-desk';
import { oneToOne, zoomBy } from './use-keys';

interface ToolButtonProps {
  readonly onPress: () => void;
  readonly pressed?: boolean;
  readonly disabled?: boolean;
  readonly shortcut?: string | undefined;
  readonly children: ReactNode;
}

/** A button of 48 px, for gloved fingers. */
export function ToolButton({ onPress, pressed, disabled = false, shortcut, children }: ToolButtonProps) {
  const look = pressed === true ? 'border-ink bg-ink text-surface' : 'border-line-strong bg-raised text-ink hover:bg-sunken';
  return (
    <button
      type="button"
      onClick={onPress}
      disabled={disabled}
      aria-pressed={pressed}
      aria-keyshortcuts={shortcut}
      className={`min-h-capture min-w-capture rounded border px-2.5 text-sm font-semibold whitespace-nowrap disabled:bg-sunken disabled:text-ink-soft ${look}`}
    >
      {children}
    </button>
  );
}

/** Tools, view and undo. */
export function ViewerToolbar({ desk, onKeys, onFullScreen }: { desk: Desk; onKeys: () => void; onFullScreen: () => void }) {
  const t = useMessages('viewer');
  const { history, windowing, readOnly } = desk;
  const isGrey = desk.source.kind === 'packed16';
  const tools: readonly Tool[] = [
    ...viewTools.filter((tool) => isGrey || (tool !== 'window' && tool !== 'region')),
    ...(readOnly ? [] : shapeTools),
  ];
  return (
    <div role="toolbar" aria-label={t('tools')} className="flex flex-wrap items-center gap-1 border-b border-line bg-surface p-1">
      {tools.map((tool) => (
        <ToolButton key={tool} onPress={() => desk.takeTool(tool)} pressed={desk.tool === tool} shortcut={letterOf(tool)}>
          {t(`tool.${tool}`)}
        </ToolButton>
      ))}
      <Gap />
      <ToolButton onPress={desk.pane.fit}>{t('fit')}</ToolButton>
      <ToolButton onPress={() => oneToOne(desk)}>{t('oneToOne')}</ToolButton>
      <ToolButton onPress={() => zoomBy(desk, 1.25)}>
        <span aria-hidden>+</span>
        <span className="sr-only">{t('zoomIn')}</span>
      </ToolButton>
      <ToolButton onPress={() => zoomBy(desk, 0.8)}>
        <span aria-hidden>−</span>
        <span className="sr-only">{t('zoomOut')}</span>
      </ToolButton>
      {windowing.invertible && (
        <ToolButton onPress={windowing.invert} pressed={windowing.inverted} shortcut="I">
          {t('invert')}
        </ToolButton>
      )}
      <ToolButton onPress={onFullScreen}>{t('fullScreen')}</ToolButton>
      {!readOnly && (
        <>
          <Gap />
          <ToolButton onPress={history.undo} disabled={!history.canUndo} shortcut="Control+Z">
            {t('undo')}
          </ToolButton>
          <ToolButton onPress={history.redo} disabled={!history.canRedo} shortcut="Control+Y">
            {t('redo')}
          </ToolButton>
          <ToolButton onPress={desk.remove} disabled={desk.selectedId === null} shortcut="Delete">
            {t('remove')}
          </ToolButton>
        </>
      )}
      <ToolButton onPress={onKeys} shortcut="?">
        {t('keys')}
      </ToolButton>
    </div>
  );
}

function letterOf(tool: Tool): string | undefined {
  return Object.entries(toolKeys)
    .find(([, named]) => named === tool)?.[0]
    .toUpperCase();
}

function Gap() {
  return <span aria-hidden className="mx-1 h-6 w-px bg-line" />;
}
