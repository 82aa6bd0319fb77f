import { Correlation } from "../../_correlation/Correlation";

export const metadata = { title: "Correlation" };

export default function Page() {
  return <Correlation />;
}
