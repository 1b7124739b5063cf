/** @jsxRuntime automatic */
import { Document, Image, Page, StyleSheet, Text, View, renderToBuffer } from '@react-pdf/renderer'
import type { ReactElement, ReactNode } from 'react'
import type { Paper } from '#shared/api/recipes.ts'
import type { Orientation } from '#shared/domain/lighting/frame.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { SheetLine } from '#shared/domain/recipes/sheet-groups.ts'
import { SHEET_DEFERS, type Sheet, type SheetLight } from '#shared/domain/recipes/sheet.ts'
import type { LengthUnit } from '#shared/units/length.ts'
import { TEXT_FONT, TITLE_FONT, loadFonts } from '#server/features/pdf/fonts.ts'
import { PlanOnPaper } from './plan-on-paper.tsx'
import { SideOnPaper } from './side-on-paper.tsx'

export type SheetFrame = { caption: string; jpeg: Uint8Array; widthPx: number; heightPx: number }

export type RecipeSheetContent = {
  paper: Paper
  unit: LengthUnit
  shoot: string
  /** "1 December 2026". */
  date: string
  /** Where the setup is used: "Dome · shots 4 and 5". */
  used: string
  orientation: Orientation
  whole: WholeSetup
  sheet: Sheet
  frames: readonly SheetFrame[]
}

/** Points of each paper: A4 is 210 × 297 mm (ISO 216), Letter 8.5 × 11 inches. */
const SIZES: Readonly<Record<Paper, { width: number; height: number; name: 'A4' | 'LETTER' }>> = {
  A4: { width: 595.28, height: 841.89, name: 'A4' },
  Letter: { width: 612, height: 792, name: 'LETTER' },
}
const SIDE_PT = 36

const styles = StyleSheet.create({
  page: {
    paddingTop: 34,
    paddingBottom: 48,
    paddingHorizontal: SIDE_PT,
    fontFamily: TEXT_FONT,
    fontSize: 8,
    color: '#000000',
    lineHeight: 1.25,
  },
  title: { fontFamily: TITLE_FONT, fontWeight: 600, fontSize: 22, lineHeight: 1.15, fontFeatureSettings: ['lnum'] },
  heading: {
    fontFamily: TITLE_FONT,
    fontWeight: 600,
    fontSize: 12,
    lineHeight: 1.2,
    marginTop: 12,
    marginBottom: 3,
    fontFeatureSettings: ['lnum'],
  },
  value: { fontWeight: 600, fontSize: 10.5, lineHeight: 1.3 },
  strong: { fontWeight: 600 },
  small: { fontSize: 7, lineHeight: 1.25 },
  row: { flexDirection: 'row', borderTopWidth: 0.5, borderTopColor: '#999999', paddingVertical: 3, gap: 6 },
  foot: { position: 'absolute', left: SIDE_PT, fontSize: 7 },
  number: { position: 'absolute', right: SIDE_PT, width: 50, textAlign: 'right', fontSize: 7 },
  again: { position: 'absolute', left: SIDE_PT, right: SIDE_PT, top: 16, fontSize: 7 },
})

/** Where two fonts meet inside a word it may be parted; only when there is no other way. */
const LATE = 9999

type Print = (text: string) => string

function Heading({ children }: { children: string }): ReactElement {
  return (
    <Text style={styles.heading} minPresenceAhead={40}>
      {children}
    </Text>
  )
}

function GroupSign({ group }: { group: string | null }): ReactElement {
  return (
    <View
      style={{
        width: 13,
        height: 13,
        borderRadius: 6.5,
        borderWidth: group === null ? 0 : 0.8,
        borderColor: '#000000',
        justifyContent: 'center',
      }}
    >
      <Text style={{ fontSize: 7.5, fontWeight: 600, textAlign: 'center', lineHeight: 1 }}>{group ?? '–'}</Text>
    </View>
  )
}

const COLUMNS = [
  { title: 'Light', grow: 17 },
  { title: 'With, on', grow: 17 },
  { title: 'Power', grow: 10 },
  { title: 'Stands, from the mark', grow: 18 },
  { title: 'From the sitter', grow: 18 },
  { title: 'Looks', grow: 13 },
  { title: 'Reads, vs main', grow: 10 },
] as const

function Cell({ index, children }: { index: number; children: ReactNode }): ReactElement {
  return (
    <View style={{ flexGrow: COLUMNS[index]?.grow ?? 1, flexShrink: 1, flexBasis: 0, minWidth: 0 }}>{children}</View>
  )
}

function LightLine({ light, print }: { light: SheetLight; print: Print }): ReactElement {
  const two = (first: string, second: string, isStrong = false) => (
    <>
      <Text style={isStrong ? styles.strong : {}} hyphenationPenalty={LATE}>
        {print(first)}
      </Text>
      {second !== '' && (
        <Text style={styles.small} hyphenationPenalty={LATE}>
          {print(second)}
        </Text>
      )}
    </>
  )
  return (
    <View style={styles.row} wrap={false}>
      <View style={{ width: 13 }}>
        <GroupSign group={light.group} />
      </View>
      <Cell index={0}>
        {two(light.name, light.unit, true)}
        {light.note !== '' && <Text style={styles.small}>{print(light.note)}</Text>}
      </Cell>
      <Cell index={1}>{two(light.made, light.support)}</Cell>
      <Cell index={2}>{two(light.power, light.zoom, true)}</Cell>
      <Cell index={3}>{two(light.place, light.height)}</Cell>
      <Cell index={4}>{two(light.distance, light.angle)}</Cell>
      <Cell index={5}>{two(light.aim, '')}</Cell>
      <Cell index={6}>{two(light.reads, light.againstMain, true)}</Cell>
    </View>
  )
}

function LightTable({ lights, print }: { lights: readonly SheetLight[]; print: Print }): ReactElement {
  const [first, ...rest] = lights
  return (
    <View>
      <View wrap={false}>
        <Heading>Lights</Heading>
        {first ? (
          <>
            <View style={{ flexDirection: 'row', gap: 6, paddingBottom: 2 }}>
              <View style={{ width: 13 }} />
              {COLUMNS.map((column, index) => (
                <Cell key={column.title} index={index}>
                  <Text style={[styles.small, styles.strong]}>{column.title}</Text>
                </Cell>
              ))}
            </View>
            <LightLine light={first} print={print} />
          </>
        ) : (
          <Text>No light yet.</Text>
        )}
      </View>
      {rest.map((light) => (
        <LightLine key={light.id} light={light} print={print} />
      ))}
    </View>
  )
}

function Readings({ lines, print }: { lines: readonly SheetLine[]; print: Print }): ReactElement {
  return (
    <View style={{ flexDirection: 'row', flexWrap: 'wrap', columnGap: 10, rowGap: 6 }}>
      {lines.map((line, index) => (
        <View key={index} style={{ width: '18%' }} wrap={false}>
          <Text style={styles.small}>{print(line.label)}</Text>
          <Text style={styles.value} hyphenationPenalty={LATE}>
            {print(line.value)}
          </Text>
          {line.more !== '' && (
            <Text style={[styles.small, { fontSize: 6.5 }]} hyphenationPenalty={LATE}>
              {print(line.more)}
            </Text>
          )}
        </View>
      ))}
    </View>
  )
}

function Lines({ lines, print }: { lines: readonly SheetLine[]; print: Print }): ReactElement {
  return (
    <View>
      {lines.map((line, index) => (
        <View key={index} style={styles.row} wrap={false}>
          <Text style={[styles.strong, { width: 86 }]} hyphenationPenalty={LATE}>
            {print(line.label)}
          </Text>
          <Text style={{ flexGrow: 5, flexShrink: 1, flexBasis: 0 }} hyphenationPenalty={LATE}>
            {print(line.value)}
          </Text>
          <Text style={{ flexGrow: 6, flexShrink: 1, flexBasis: 0 }} hyphenationPenalty={LATE}>
            {print(line.more)}
          </Text>
        </View>
      ))}
    </View>
  )
}

const TONE_WORDS = { red: 'Put right first', mind: 'Mind', fine: 'Settled' } as const
const TONE_EDGE = { red: 3, mind: 1, fine: 0 } as const

function Cautions({ cautions, print }: { cautions: Sheet['cautions']; print: Print }): ReactElement {
  return (
    <View style={{ gap: 5 }}>
      {cautions.map((caution) => (
        <View
          key={caution.key}
          wrap={false}
          style={{
            borderLeftWidth: TONE_EDGE[caution.tone],
            borderLeftColor: '#000000',
            paddingLeft: caution.tone === 'fine' ? 8 : 8 - TONE_EDGE[caution.tone],
          }}
        >
          <Text>
            <Text style={styles.strong}>{`${TONE_WORDS[caution.tone]}: ${print(caution.title)}. `}</Text>
            {print(caution.words)}
          </Text>
        </View>
      ))}
      <Text style={styles.small} wrap={false}>
        {SHEET_DEFERS}
      </Text>
    </View>
  )
}

/** The test frames side by side, as high as the row allows. */
function Frames({
  frames,
  widthPt,
  print,
}: {
  frames: readonly SheetFrame[]
  widthPt: number
  print: Print
}): ReactElement {
  const gap = 6
  const shares = frames.map((frame) => frame.widthPx / frame.heightPx)
  const height = Math.min(118, (widthPt - gap * (frames.length - 1)) / shares.reduce((sum, share) => sum + share, 0))
  return (
    <View style={{ flexDirection: 'row', gap, marginTop: 10 }} wrap={false}>
      {frames.map((frame, index) => (
        <View key={index} style={{ width: height * (shares[index] ?? 1) }}>
          <Image src={{ data: Buffer.from(frame.jpeg), format: 'jpg' }} style={{ width: '100%', height }} />
          <Text style={[styles.small, { marginTop: 2 }]}>{print(frame.caption)}</Text>
        </View>
      ))}
    </View>
  )
}

function RecipeSheet({ content, print }: { content: RecipeSheetContent; print: Print }): ReactElement {
  const { paper, unit, whole, sheet, frames } = content
  const size = SIZES[paper]
  const width = size.width - 2 * SIDE_PT
  const footY = size.height - 32
  const name = print(whole.setup.name)
  const shoot = print(content.shoot)
  const drawing = { whole, orientation: content.orientation, lights: sheet.lights, unit, width, printable: print }
  return (
    <Document title={`${whole.setup.name} · recipe sheet`} creator="Sconce" producer="Sconce" language="en">
      <Page size={size.name} style={styles.page}>
        <Text
          style={styles.again}
          fixed
          render={({ pageNumber }) => (pageNumber > 1 ? `Recipe sheet · ${name}` : '')}
        />
        <Text style={[styles.foot, { top: footY, width: width - 60, maxLines: 1, textOverflow: 'ellipsis' }]} fixed>
          {`${name} · ${shoot} · ${content.date}`}
        </Text>
        <Text
          style={[styles.number, { top: footY }]}
          fixed
          render={({ pageNumber, totalPages }) => `${pageNumber} of ${totalPages}`}
        />
        <Text style={styles.small}>{`Recipe sheet · ${shoot} · ${content.date}`}</Text>
        <Text style={styles.title} hyphenationPenalty={LATE}>
          {name}
        </Text>
        <Text style={{ marginTop: 4 }}>{print(content.used)}</Text>
        {whole.setup.note.trim() !== '' && <Text style={{ marginTop: 6 }}>{print(whole.setup.note.trim())}</Text>}
        <View style={{ marginTop: 8, borderTopWidth: 1, borderTopColor: '#000000', paddingTop: 8 }} wrap={false}>
          <PlanOnPaper {...drawing} height={paper === 'A4' ? 326 : 290} />
        </View>
        <View style={{ marginTop: 10 }} wrap={false}>
          <SideOnPaper {...drawing} height={paper === 'A4' ? 160 : 150} />
        </View>
        {frames.length > 0 && <Frames frames={frames} widthPt={width} print={print} />}
        <LightTable lights={sheet.lights} print={print} />
        {sheet.panels.length > 0 && (
          <>
            <Heading>Panels give back</Heading>
            <Lines lines={sheet.panels} print={print} />
          </>
        )}
        <Heading>Readings</Heading>
        <Readings lines={sheet.readings} print={print} />
        {sheet.groups.map((group) => (
          <View key={group.title}>
            <Heading>{group.title}</Heading>
            <Readings lines={group.lines} print={print} />
          </View>
        ))}
        <Heading>Camera and set</Heading>
        <Lines lines={sheet.camera} print={print} />
        <Heading>Kit</Heading>
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', columnGap: 10, rowGap: 2 }}>
          {sheet.kit.map((item) => (
            <Text key={item.name} style={{ width: '31.5%' }}>{`${item.count} × ${print(item.name)}`}</Text>
          ))}
        </View>
        <Heading>Cautions</Heading>
        <Cautions cautions={sheet.cautions} print={print} />
      </Page>
    </Document>
  )
}

/** The recipe sheet as the bytes of a PDF. */
export async function renderRecipeSheet(content: RecipeSheetContent): Promise<Buffer> {
  const print = await loadFonts()
  return renderToBuffer(<RecipeSheet content={content} print={print} />)
}
