import { Order } from "../../_order/Order";

export const metadata = { title: "Order" };

export default function Page() {
  return <Order />;
}
