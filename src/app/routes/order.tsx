import { OrderScreen } from '#src/features/order/components/order-screen.tsx'

export { OrderScreen as Component }
