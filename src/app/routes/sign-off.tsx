import { SignOffScreen } from '#src/features/sign-off/components/sign-off-screen.tsx'

export { SignOffScreen as Component }
