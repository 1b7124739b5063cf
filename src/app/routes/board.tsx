import { BoardScreen } from '#src/features/board/components/board-screen.tsx'

export { BoardScreen as Component }
