import { Drivers } from "../../_drivers/Drivers";

export const metadata = { title: "Drivers" };

export default function Page() {
  return <Drivers />;
}
