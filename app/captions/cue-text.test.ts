import { expect, test } from "vitest";
import { escapeCueText, fileCueText, losesWordsInBrowser, plainText } from "./cue-text";

test("markup goes, words stay, also those after a bare sign", () => {
  expect(plainText("<v Marta>Now <i>eighty-eight</i> <00:12:44.000>newton metres</v>")).toBe(
    "Now eighty-eight newton metres",
  );
  expect(plainText("Runout < 0.05 mm then torque 39 ft-lb")).toBe("Runout < 0.05 mm then torque 39 ft-lb");
  expect(plainText("under <80 Nm and >60 Nm")).toBe("under <80 Nm and >60 Nm");
  expect(plainText('<c.colorE5E5E5>lower</c> <font color="#fff">nut</font>')).toBe("lower nut");
});

test("character references are read, unknown ones stay as written", () => {
  expect(plainText("30 &plusmn; 2 N&middot;m &amp; 90&deg;&#32;more &#x20;&nbsp;x")).toBe(
    "30 ± 2 N·m & 90° more  \u00a0x",
  );
  expect(plainText("R&D &unknown; &#0; &#xD800;")).toBe("R&D &unknown; \ufffd \ufffd");
});

test("what would break a file or hide words is written out, markup is kept", () => {
  expect(fileCueText("Runout < 0.05 & torque")).toBe("Runout &lt; 0.05 &amp; torque");
  expect(fileCueText("<b>one</b> &amp; two --> three\n\nfour")).toBe(
    "<b>one</b> &amp; two --&gt; three\nfour",
  );
  expect(escapeCueText("Nut & <stud>")).toBe("Nut &amp; &lt;stud&gt;");
  expect(losesWordsInBrowser("Runout < 0.05")).toBe(true);
  expect(losesWordsInBrowser("<i>Runout</i> &lt; 0.05")).toBe(false);
});
