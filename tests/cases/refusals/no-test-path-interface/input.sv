// expect: held refused no-test-path: interfaces are not edited
interface mail_if (input logic clk);
    logic       post;
    logic [7:0] letter, held;
    always_ff @(posedge clk) if (post) held <= letter;
endinterface
module mail_room (
    input  logic       clk, post,
    input  logic [7:0] letter,
    output logic [7:0] held
);
    mail_if m (.clk(clk));
    assign m.post = post;
    assign m.letter = letter;
    assign held = m.held;
endmodule
