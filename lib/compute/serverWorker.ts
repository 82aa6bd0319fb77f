import { answer } from "./answer";

/** A server thread prices what it is sent. */
export default answer;
