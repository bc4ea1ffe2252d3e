(() => {
  "use strict";
  const key = cell => cell.dataset.sort ?? cell.textContent.replace(/[,\s\u2007\u2008×%+]/g, "");
  const compare = (a, b) => {
    const x = Number(a), y = Number(b);
    if (a === "" || b === "") return (a === "") - (b === "");
    return Number.isNaN(x) || Number.isNaN(y) ? a.localeCompare(b) : x - y;
  };
  for (const table of document.querySelectorAll("table[data-long]")) {
    const heads = [...table.tHead.rows[0].cells];
    heads.forEach((head, column) => {
      const button = document.createElement("button");
      button.type = "button";
      button.append(...head.childNodes);
      head.append(button);
      button.addEventListener("click", () => {
        const down = head.getAttribute("aria-sort") === "ascending";
        heads.forEach(other => other.removeAttribute("aria-sort"));
        head.setAttribute("aria-sort", down ? "descending" : "ascending");
        const rows = [...table.tBodies[0].rows].map(row => [key(row.cells[column]), row]);
        rows.sort((a, b) => down && a[0] !== "" && b[0] !== "" ? compare(b[0], a[0]) : compare(a[0], b[0]));
        table.tBodies[0].append(...rows.map(pair => pair[1]));
      });
    });
  }
  for (const box of document.querySelectorAll("[data-find]")) {
    const table = document.getElementById(box.dataset.find);
    const label = document.createElement("label");
    const input = document.createElement("input");
    const found = document.createElement("span");
    input.type = "search";
    found.setAttribute("role", "status");
    label.append("Show only sources whose name holds ", input);
    box.append(label, " ", found);
    input.addEventListener("input", () => {
      const wanted = input.value.toLowerCase();
      let shown = 0;
      for (const row of table.tBodies[0].rows) {
        row.hidden = !row.cells[0].textContent.toLowerCase().includes(wanted);
        if (!row.hidden) shown++;
      }
      found.textContent = wanted === "" ? "" : `${shown.toLocaleString("en-GB")} of ${table.tBodies[0].rows.length.toLocaleString("en-GB")}`;
    });
  }
})();
