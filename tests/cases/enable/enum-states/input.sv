// expect: cargo gated
// expect: state left too-few-bits
package crane_pkg;
    typedef enum logic [1:0] { IDLE, GRAB, LIFT, DROP } crane_e;
    localparam logic [7:0] HEAVY = 8'd90;
endpackage
module dock_crane (
    input  logic       clk, rst_n,
    input  logic       call, at_top,
    input  logic [7:0] load,
    output logic [7:0] cargo,
    output crane_pkg::crane_e state
);
    import crane_pkg::*;
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) state <= IDLE;
        else case (state)
            IDLE: if (call) state <= GRAB;
            GRAB: state <= LIFT;
            LIFT: if (at_top) state <= DROP;
            DROP: state <= IDLE;
        endcase
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) cargo <= '0;
        else case (state)
            GRAB: cargo <= load;
            crane_pkg::DROP: if (cargo > crane_pkg::HEAVY) cargo <= cargo - crane_pkg::HEAVY; else cargo <= '0;
            default: ;
        endcase
endmodule
