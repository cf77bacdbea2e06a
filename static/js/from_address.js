// A code or token stands behind the # of a link, where it reaches no server log. It is moved into the form and taken
// out of the address, so that neither history nor a shared screenshot holds it.
const field = document.querySelector("[data-from-address]");
const brought = location.hash.slice(1);
if (field && brought) {
  field.value = brought;
  history.replaceState(null, "", location.pathname + location.search);
  if (field.dataset.fromAddress === "send") field.form.requestSubmit();
}
